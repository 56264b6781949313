namespace LabWatch.Metrology.Cavities;

/// <summary>
/// A temperature profile along the axis from the wells, by the monotone cubic interpolation of F. N. Fritsch and R. E. Carlson, SIAM J. Numer. Anal. 17 (1980) 238-246,
/// with the slopes of F. N. Fritsch and J. Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300-304: between two wells it never leaves their temperatures. Outside of the
/// wells the nearest one holds.
/// </summary>
public sealed class AxialProfile
{
    private readonly double[] _positions;
    private readonly double[] _slopes;

    /// <summary>Prepares the positions.</summary>
    /// <param name="positions">Axial positions of the wells above the rim of the bottom, rising, at least one; any unit.</param>
    public AxialProfile(IReadOnlyList<double> positions)
    {
        ArgumentNullException.ThrowIfNull(positions);
        if (positions.Count == 0) throw new ArgumentException("At least one well is needed.", nameof(positions));
        for (int i = 1; i < positions.Count; i++)
        {
            if (!(positions[i] > positions[i - 1])) throw new ArgumentException("The positions have to rise.", nameof(positions));
        }

        _positions = [.. positions];
        _slopes = new double[_positions.Length];
    }

    /// <summary>Fills the temperatures of zones. Nothing is allocated; one profile must not be filled from two threads at once.</summary>
    /// <param name="temperatures">Temperature at each well.</param>
    /// <param name="zones">The zones, in units of the radius.</param>
    /// <param name="radius">Radius of the cavity in the unit of the positions.</param>
    /// <param name="target">Receives the temperature of each zone.</param>
    public void Fill(ReadOnlySpan<double> temperatures, IReadOnlyList<Zone> zones, double radius, Span<double> target)
    {
        ArgumentNullException.ThrowIfNull(zones);
        if (temperatures.Length != _positions.Length) throw new ArgumentException("One temperature for each well is needed.", nameof(temperatures));
        SetSlopes(temperatures);
        for (int i = 0; i < zones.Count; i++) target[i] = At(temperatures, zones[i].Z * radius);
    }

    private double At(ReadOnlySpan<double> t, double z)
    {
        int last = _positions.Length - 1;
        if (z <= _positions[0]) return t[0];
        if (z >= _positions[last]) return t[last];
        int i = 0;
        while (z > _positions[i + 1]) i++;
        double h = _positions[i + 1] - _positions[i], s = (z - _positions[i]) / h, r = 1 - s;
        return t[i] * (1 + 2 * s) * r * r + t[i + 1] * s * s * (1 + 2 * r) + h * s * r * (_slopes[i] * r - _slopes[i + 1] * s);
    }

    /// <summary>Weighted harmonic means of the slopes on both sides, zero at an extreme; one-sided and limited at the ends.</summary>
    private void SetSlopes(ReadOnlySpan<double> t)
    {
        int n = _positions.Length;
        if (n == 1) return;
        if (n == 2)
        {
            _slopes[0] = _slopes[1] = Secant(t, 0);
            return;
        }

        for (int i = 1; i < n - 1; i++)
        {
            double before = Secant(t, i - 1), after = Secant(t, i);
            double hBefore = _positions[i] - _positions[i - 1], hAfter = _positions[i + 1] - _positions[i];
            double w1 = 2 * hAfter + hBefore, w2 = hAfter + 2 * hBefore;
            _slopes[i] = before * after > 0 ? (w1 + w2) / (w1 / before + w2 / after) : 0;
        }

        _slopes[0] = End(Secant(t, 0), Secant(t, 1), _positions[1] - _positions[0], _positions[2] - _positions[1]);
        _slopes[n - 1] = End(Secant(t, n - 2), Secant(t, n - 3), _positions[n - 1] - _positions[n - 2], _positions[n - 2] - _positions[n - 3]);
    }

    private double Secant(ReadOnlySpan<double> t, int i) => (t[i + 1] - t[i]) / (_positions[i + 1] - _positions[i]);

    private static double End(double near, double next, double h, double hNext)
    {
        double slope = ((2 * h + hNext) * near - h * next) / (h + hNext);
        if (slope * near <= 0) return 0;
        return near * next <= 0 && Math.Abs(slope) > 3 * Math.Abs(near) ? 3 * near : slope;
    }
}
