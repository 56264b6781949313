using LabWatch.Assessments.Cavities;
using LabWatch.Metrology.Cavities;

namespace LabWatch.Assessments.Profiles;

/// <summary>
/// Turns temperatures of the wells and of the lip into those of a cavity's zones. Between them by monotone cubic interpolation (see
/// <see cref="AxialProfile"/>); below the deepest well that one holds. A re-entrant bottom has the temperature of its rim, not that of the wall
/// beside it. Serves one evaluation at a time.
/// </summary>
internal sealed class AxialField
{
    private const double IceKelvin = 273.15;

    private readonly IReadOnlyList<Zone> _zones;
    private readonly double _radius;
    private readonly int _wells;
    private readonly AxialProfile _shape;
    private readonly bool _hasLip;

    /// <summary>Prepares the places.</summary>
    /// <param name="evidence">Evidence with at least one well.</param>
    /// <param name="zones">The zones, in units of the radius.</param>
    /// <param name="toLip">Whether the wall falls to the lip; else it stays at the well nearest to the aperture, and only the plate has the lip's temperature.</param>
    public AxialField(AxialEvidence evidence, IReadOnlyList<Zone> zones, bool toLip)
    {
        CavityDescription cavity = evidence.Cavity;
        (_radius, _wells) = (cavity.Geometry.Radius, evidence.Wells.Count);
        _zones = cavity.Geometry.Form == CavityForm.CylinderInwardCone
            ? [.. zones.Select(zone => zone.Surface == CavitySurface.Bottom ? zone with { Z = 0 } : zone)]
            : zones;
        double top = cavity.ApertureHeight;
        double[] places = new double[_wells + 1];
        for (int i = 0; i < _wells; i++)
        {
            places[i] = top - evidence.Wells[i].PositionMillimetre;
        }

        places[_wells] = top;
        _hasLip = toLip && cavity.Geometry.Form != CavityForm.FlatPlate && top > places[_wells - 1];
        _shape = new AxialProfile(_hasLip ? places : places[..^1]);
    }

    /// <summary>Whether the wall falls to the lip.</summary>
    public bool ReachesLip => _hasLip;

    /// <summary>The temperatures of the zones, kelvin.</summary>
    /// <param name="wellCelsius">Temperature of each well.</param>
    /// <param name="lipCelsius">Temperature of the lip; NaN where the plate is as warm as the wall.</param>
    /// <param name="dropPart">Well minus wall, as a part of the difference between well and room.</param>
    /// <param name="airCelsius">Temperature of the room.</param>
    /// <param name="kelvin">Receives them.</param>
    public void Fill(ReadOnlySpan<double> wellCelsius, double lipCelsius, double dropPart, double airCelsius, Span<double> kelvin)
    {
        Span<double> nodes = stackalloc double[_wells + (_hasLip ? 1 : 0)];
        for (int i = 0; i < _wells; i++)
        {
            nodes[i] = wellCelsius[i] - (dropPart * (wellCelsius[i] - airCelsius)) + IceKelvin;
        }

        if (_hasLip)
        {
            nodes[_wells] = lipCelsius + IceKelvin;
        }

        _shape.Fill(nodes, _zones, _radius, kelvin);
        if (_hasLip || double.IsNaN(lipCelsius))
        {
            return;
        }

        for (int i = 0; i < _zones.Count; i++)
        {
            kelvin[i] = _zones[i].Surface == CavitySurface.Plate ? lipCelsius + IceKelvin : kelvin[i];
        }
    }
}
