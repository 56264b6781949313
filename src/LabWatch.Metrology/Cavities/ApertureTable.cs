namespace LabWatch.Metrology.Cavities;

/// <summary>View factors to an aperture that a re-entrant cone hides in part, tabulated along the meridian; cubic interpolation.</summary>
internal sealed class ApertureTable
{
    private const int Intervals = 1024;
    private readonly double[][] _values;
    private readonly double[] _perLength;

    public ApertureTable(Meridian meridian)
    {
        var rings = new ApertureRings(meridian);
        _values = new double[meridian.Lines.Count][];
        _perLength = new double[meridian.Lines.Count];
        for (int line = 0; line < _values.Length; line++)
        {
            MeridianLine m = meridian.Lines[line];
            _perLength[line] = Intervals / m.Length;
            _values[line] = [.. Enumerable.Range(0, Intervals + 1).Select(i => m.Surface == CavitySurface.Plate
                ? 0
                : rings.From(RingPoint.On(meridian, line, Math.Min(m.Length * (1 - 1e-9), m.Length * i / Intervals))))];
        }
    }

    public double Of(int line, double t)
    {
        double[] values = _values[line];
        double x = t * _perLength[line];
        int i = Math.Clamp((int)x, 1, Intervals - 2);
        double u = x - i, before = values[i - 1], at = values[i], next = values[i + 1], after = values[i + 2];
        return at + u * ((next - before) / 2 + u * (before - 2.5 * at + 2 * next - after / 2 + u * (1.5 * (at - next) + (after - before) / 2)));
    }
}
