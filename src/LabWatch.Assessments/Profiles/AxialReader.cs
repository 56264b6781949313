using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;

namespace LabWatch.Assessments.Profiles;

/// <summary>
/// Makes the axial evidence out of readings: the one way for the criteria (a window of readings) and for the live profile (the newest of each
/// channel). Wells with a certificate in force are used; one whose certificate is much coarser than the reference's would add its own error
/// rather than knowledge of the cavity, and is left out by name.
/// </summary>
internal sealed class AxialReader
{
    /// <summary>A well is left out where its certificate's standard uncertainty is larger than the reference's by more than this factor.</summary>
    public const double CoarseFactor = 3;

    /// <summary>Part of the readings that a well and a comparator must have over the window of a criterion.</summary>
    public const double LeastCoverage = 0.8;

    /// <summary>Standard uncertainty of a lip thermometer without a certificate, kelvin.</summary>
    private const double UncalibratedLipKelvin = 1;

    private const double SamePlaceMillimetre = 0.01;

    private readonly LabSnapshot _snapshot;
    private readonly ReferenceSource _source;
    private readonly TimeWindow _window;
    private readonly ReadingWindow _readings;
    private readonly double _leastCoverage;
    private readonly List<string> _leftOut = [];
    private readonly List<string> _obstacles = [];
    private readonly List<WellPoint> _wells = [];

    private AxialReader(LabSnapshot snapshot, ReferenceSource source, TimeWindow window, ReadingWindow readings, double leastCoverage)
    {
        (_snapshot, _source, _window, _readings, _leastCoverage) = (snapshot, source, window, readings, leastCoverage);
    }

    /// <summary>The ids of the channels that are read.</summary>
    public static IReadOnlyList<string> Channels(ReferenceSource source) =>
        JunctionTemperatures.With(source, [.. source.Channels.Where(channel => channel.Quantity is ChannelQuantity.WellThermometer or ChannelQuantity.SetPoint or ChannelQuantity.ApertureLip
            or ChannelQuantity.AmbientTemperature or ChannelQuantity.Shutter or ChannelQuantity.ComparatorTemperature or ChannelQuantity.ComparatorSignal).Select(channel => channel.Id)]);

    /// <summary>Reads the evidence.</summary>
    /// <param name="snapshot">What is configured.</param>
    /// <param name="source">The source.</param>
    /// <param name="window">The window.</param>
    /// <param name="readings">Readings over at least the window.</param>
    /// <param name="leastCoverage">Part of the promised readings that a channel must have; 0 where any will do.</param>
    public static AxialEvidence Read(LabSnapshot snapshot, ReferenceSource source, TimeWindow window, ReadingWindow readings, double leastCoverage = LeastCoverage) =>
        new AxialReader(snapshot, source, window, readings, leastCoverage).Read();

    private AxialEvidence Read()
    {
        double coarse = CoarseFactor * ReferenceUncertainty();
        foreach (Channel well in _source.Channels
            .Where(channel => channel.Quantity is ChannelQuantity.WellThermometer)
            .OrderByDescending(channel => channel.IsReference)
            .ThenByDescending(channel => channel.AxialPositionMillimetre))
        {
            Add(well, coarse);
        }

        _wells.Sort((one, other) => other.PositionMillimetre.CompareTo(one.PositionMillimetre));
        SurroundingsPoint surroundings = Surroundings();
        WellPoint? reference = _source.ReferenceChannel is { } channel
            ? _wells.FirstOrDefault(well => well.Channel.Key == channel.Key)
            : _wells.FirstOrDefault();
        return new(
            _source, _window, CavityDescription.Of(_source), _wells, reference, Lip(), surroundings, new ComparatorReader(_snapshot, _source, _window, _readings, _leastCoverage).Read(), _leftOut, _obstacles);
    }

    private double ReferenceUncertainty() =>
        _source.ReferenceChannel is { } reference && _snapshot.CertificateInForce(reference.Key, LastInstant) is { } certificate
            ? Uncertainty(certificate)
            : double.PositiveInfinity;

    /// <summary>The latest instant inside the window.</summary>
    private Instant LastInstant => new(_window.End.Microseconds - 1);

    private void Add(Channel well, double coarse)
    {
        WindowMean mean = WindowMean.Of(_snapshot, well, _window, _readings);
        int expected = Expected(_window, well);
        if (mean.Certificate is not { } certificate)
        {
            (well.IsReference ? _obstacles : _leftOut).Add(well.IsReference ? $"no certificate is in force for {well.Id}" : $"{well.Id}, for which no certificate is in force");
        }
        else if (Uncertainty(certificate) > coarse)
        {
            _leftOut.Add(
                $"{well.Id}, whose certificate states U = {Quantities.Significant(2 * Uncertainty(certificate))} K, against {Quantities.Significant(2 * coarse / CoarseFactor)} K of the reference (k = 2)");
        }
        else if (well.AxialPositionMillimetre is not { } position)
        {
            _leftOut.Add($"{well.Id}, whose place on the axis is not stated");
        }
        else if (_wells.Any(other => Math.Abs(other.PositionMillimetre - position) < SamePlaceMillimetre))
        {
            _leftOut.Add($"{well.Id}, which sits in the same place as another well");
        }
        else if (mean.CertificateChanged)
        {
            _obstacles.Add($"the certificate or the instrument in force for {well.Id} changed within the window");
        }
        else if (mean.Count == 0 || mean.Count < _leastCoverage * expected)
        {
            string clause = $"{well.Id} gave {Quantities.Count(mean.Count)} of {Quantities.Count(expected)} readings{JunctionText.Behind(_source, well, mean.WithoutJunction)}";
            (_leastCoverage > 0 || well.IsReference ? _obstacles : _leftOut).Add(clause);
        }
        else if (mean.OutsideCertificate > 0)
        {
            _obstacles.Add(
                $"{Quantities.Count(mean.OutsideCertificate)} of {Quantities.Count(mean.Count)} readings of {well.Id} lie outside the range of its certificate "
                + $"({Quantities.Fixed(certificate.MinimumCelsius, 0)} to {Quantities.Fixed(certificate.MaximumCelsius, 0)} degC)");
        }
        else
        {
            _wells.Add(new(well, position, mean.Celsius, mean.CalibrationKelvin, mean.NoiseKelvin, certificate.Reference));
        }
    }

    private LipPoint? Lip()
    {
        Channel? channel = _source.Channels.FirstOrDefault(candidate => candidate.Quantity is ChannelQuantity.ApertureLip);
        return channel is not null && WindowMean.Of(_snapshot, channel, _window, _readings) is { HasValue: true } mean
            ? new(channel.Id, mean.Celsius, mean.StandardUncertainty(UncalibratedLipKelvin), double.IsFinite(mean.CalibrationKelvin))
            : null;
    }

    private SurroundingsPoint Surroundings()
    {
        Channel? channel = _source.Channels.FirstOrDefault(candidate => candidate.Quantity is ChannelQuantity.AmbientTemperature);
        double air = SurroundingsPoint.UsualCelsius, u = SurroundingsPoint.UsualUncertaintyKelvin;
        bool isMeasured = false;
        if (channel is not null && WindowMean.Of(_snapshot, channel, _window, _readings) is { HasValue: true } mean)
        {
            (air, u, isMeasured) = (mean.Celsius, mean.StandardUncertainty(SurroundingsPoint.UncalibratedKelvin), true);
        }

        Metrology.Uncertainty.Estimate offset = _source.SurroundingsOffsetKelvin;
        return new(air, new(air + offset.Value, double.Hypot(u, offset.StandardUncertainty)), isMeasured);
    }

    /// <summary>Readings that a channel promised over a window.</summary>
    internal static int Expected(TimeWindow window, Channel channel) => Math.Max(1, (int)(window.Duration / channel.Interval));

    private static double Uncertainty(Certificate certificate) => certificate.Characteristic.ExpandedUncertaintyKelvin / certificate.Characteristic.CoverageFactor;
}
