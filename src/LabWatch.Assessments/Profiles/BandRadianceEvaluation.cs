using LabWatch.Assessments.Cavities;
using LabWatch.Metrology.Cavities;
using LabWatch.Metrology.Radiometry;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Assessments.Profiles;

/// <summary>
/// Effective emissivity and radiance temperature of a source in one band from its axial profile:
/// e_eff = sum of w_i L(T_i)/L(T_ref), reflected part 1 - sum of w_i. Each input is moved by its standard uncertainty both ways (JCGM 100:2008,
/// 5.1.3 note 2), because the interpolation between wells has no derivative where a slope vanishes.
/// </summary>
internal sealed class BandRadianceEvaluation
{
    private const double IceKelvin = 273.15;

    private readonly BandModel _model;
    private readonly AxialEvidence _evidence;
    private readonly ZoneWeights _weights;
    private readonly RadianceBand _band;
    private readonly AxialField _field;
    private readonly double[] _wells;
    private readonly int _reference;
    private readonly double _lip;
    private readonly double[] _kelvin;
    private readonly double[] _deficits;
    private readonly List<Contribution> _contributions = [];

    private BandRadianceEvaluation(BandModel model, AxialEvidence evidence)
    {
        (_model, _evidence, _weights, _band) = (model, evidence, model.Weights!, model.Radiance);
        IReadOnlyList<Zone> zones = _weights.Counts.Grid.Zones;
        _field = new AxialField(evidence, zones, toLip: evidence.Lip is not null);
        _wells = [.. evidence.Wells.Select(well => well.Celsius)];
        _reference = Enumerable.Range(0, _wells.Length).First(i => ReferenceEquals(evidence.Wells[i], evidence.Reference));
        _lip = evidence.Lip?.Celsius ?? double.NaN;
        (_kelvin, _deficits) = (new double[zones.Count], new double[zones.Count]);
    }

    /// <summary>Evaluates a band; null where there is no model or no reference temperature.</summary>
    public static BandRadiance? Of(BandModel model, AxialEvidence evidence)
    {
        ArgumentNullException.ThrowIfNull(model);
        ArgumentNullException.ThrowIfNull(evidence);
        return model.Weights is null || !evidence.HasProfile ? null : new BandRadianceEvaluation(model, evidence).Evaluate();
    }

    private BandRadiance Evaluate()
    {
        Radiated best = At();
        double discretisation = Discretisation(best);
        Optics(best);
        Wells();
        Around(best);
        Shape(best);
        Numerical(best, discretisation);
        return new(_model, _evidence, best, _contributions);
    }

    /// <summary>Coating and diffuse fraction, on the temperatures of the best estimate.</summary>
    private void Optics(in Radiated best)
    {
        foreach (OpticsSide side in _model.Sides)
        {
            ContributionKind kind = side.Name switch
            {
                "emissivity" => ContributionKind.Emissivity,
                "second-emissivity" => ContributionKind.SecondEmissivity,
                _ => ContributionKind.DiffuseFraction,
            };
            Add(kind, null, From(side.High, best.ReferenceKelvin, best.BackgroundRadiance), From(side.Low, best.ReferenceKelvin, best.BackgroundRadiance), side.Scale);
        }
    }

    private void Wells()
    {
        for (int i = 0; i < _wells.Length; i++)
        {
            WellPoint well = _evidence.Wells[i];
            double u = well.StandardUncertainty, at = _wells[i];
            _wells[i] = at + u;
            Radiated high = At();
            _wells[i] = at - u;
            Radiated low = At();
            _wells[i] = at;
            Add(ContributionKind.Well, well.Channel.Id, high, low, 0.5, u > 0 ? well.NoiseKelvin / u : 0);
        }
    }

    private void Around(in Radiated best)
    {
        Estimate drop = _evidence.Source.WellToWallDrop, around = _evidence.Surroundings.RadianceCelsius;
        Add(
            ContributionKind.WellToWall,
            null,
            At(dropPart: drop.Value + drop.StandardUncertainty),
            At(dropPart: drop.Value - drop.StandardUncertainty),
            0.5);
        if (_evidence.Lip is { } lip)
        {
            Add(ContributionKind.Lip, lip.Channel, At(lip: lip.Celsius + lip.StandardUncertainty), At(lip: lip.Celsius - lip.StandardUncertainty), 0.5);
        }

        At();
        Add(
            ContributionKind.Surroundings,
            null,
            From(_weights, best.ReferenceKelvin, _band.Radiance(around.Value + around.StandardUncertainty + IceKelvin)),
            From(_weights, best.ReferenceKelvin, _band.Radiance(around.Value - around.StandardUncertainty + IceKelvin)),
            0.5);
    }

    /// <summary>
    /// Between the well nearest to the aperture and the lip nothing measures the wall: it may fall evenly, or only at the edge. The best
    /// estimate lies at one end of what is possible, so the whole difference over sqrt(3).
    /// </summary>
    private void Shape(in Radiated best)
    {
        double lip = _evidence.Lip?.Celsius ?? _evidence.Surroundings.AirCelsius;
        AxialField other = new(_evidence, _weights.Counts.Grid.Zones, toLip: _evidence.Lip is null);
        if (other.ReachesLip != _field.ReachesLip)
        {
            Add(ContributionKind.LipShape, null, At(other, lip, _evidence.Source.WellToWallDrop.Value), best, 1 / Math.Sqrt(3));
        }
    }

    private void Numerical(in Radiated best, double discretisation)
    {
        double slope = _band.RadianceSlope(best.RadianceKelvin), error = _model.MethodError;
        _contributions.Add(new(
            ContributionKind.Method, null, new(error, error, 0, error * (best.ReferenceRadiance - best.BackgroundRadiance) / slope, 0, 0, 0), 0));
        _contributions.Add(new(
            ContributionKind.Discretisation, null, new(discretisation, 0, -discretisation, discretisation * best.ReferenceRadiance / slope, 0, 0, 0), 0));
    }

    /// <summary>
    /// What taking the radiance as linear between the nodes of the wall leaves out: the mean of -h^2/12 L'' over an interval, with L'' from
    /// neighbouring nodes and the hits of the node.
    /// </summary>
    private double Discretisation(in Radiated best)
    {
        IReadOnlyList<Zone> zones = _weights.Counts.Grid.Zones;
        ReadOnlySpan<double> weights = _weights.Weights;
        double sum = 0;
        for (int i = 1; _weights.Counts.Grid.Linear && i + 1 < zones.Count; i++)
        {
            if (zones[i - 1].Surface != zones[i].Surface || zones[i + 1].Surface != zones[i].Surface)
            {
                continue;
            }

            double before = Distance(zones[i], zones[i - 1]), after = Distance(zones[i + 1], zones[i]);
            double curvature = 2 * (((_deficits[i + 1] - _deficits[i]) / after) - ((_deficits[i] - _deficits[i - 1]) / before)) / (before + after);
            sum += weights[i] * curvature * ((before * before) + (after * after)) / 24;
        }

        return Math.Abs(sum);
    }

    private static double Distance(in Zone one, in Zone other) => double.Hypot(one.R - other.R, one.Z - other.Z);

    private void Add(ContributionKind kind, string? channel, in Radiated high, in Radiated low, double factor, double noisePart = 0) =>
        _contributions.Add(new(kind, channel, Radiated.Difference(high, low, factor), noisePart));

    private Radiated At(double? dropPart = null, double? lip = null) => At(_field, lip ?? _lip, dropPart ?? _evidence.Source.WellToWallDrop.Value);

    private Radiated At(AxialField field, double lip, double dropPart)
    {
        field.Fill(_wells, lip, dropPart, _evidence.Surroundings.AirCelsius, _kelvin);
        double reference = _wells[_reference] + IceKelvin, radiance = _band.Radiance(reference);
        for (int i = 0; i < _kelvin.Length; i++)
        {
            _deficits[i] = 1 - (_band.Radiance(_kelvin[i]) / radiance);
        }

        return From(_weights, reference, _band.Radiance(_evidence.Surroundings.RadianceCelsius.Value + IceKelvin));
    }

    /// <summary>Puts weights and the deficits of the zones together.</summary>
    private Radiated From(ZoneWeights weights, double referenceKelvin, double background)
    {
        double radiance = _band.Radiance(referenceKelvin), complement = weights.Complement(_deficits);
        double seen = ((1 - complement) * radiance) + (weights.IsothermalComplement * background);
        return new(1 - complement, weights.Isothermal, complement - weights.IsothermalComplement, _band.Temperature(seen), referenceKelvin, radiance, background);
    }
}
