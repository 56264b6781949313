using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;

namespace LabWatch.Assessments.Criteria.StabilityParts;

/// <summary>The reasons not to decide, each as a clause with its numbers and units.</summary>
internal static class StabilityObstacles
{
    /// <summary>Part of the 10 s means that a window must have.</summary>
    public const double LeastCoverage = 0.8;

    /// <summary>Part of the 10 s means that the lead-in must have to tell whether the source had settled.</summary>
    public const double LeastLeadInCoverage = 0.5;

    private const double RoomCelsius = 23;

    public static IEnumerable<string> Of(StabilityEvidence evidence, StabilityValue value, AcceptanceLimit? limit, bool comparable) =>
        Data(evidence, value)
            .Concat(Traceability(evidence))
            .Concat(SetPoint(evidence))
            .Concat(Approach(evidence, limit))
            .Concat(Limit(evidence, limit, comparable));

    /// <summary>
    /// How far a source may stand from its set point and still be at it, kelvin: 2 K, or 1 % of the distance from room temperature where
    /// that is more. Wide on purpose, because controller and reference thermometer sit in different places.
    /// </summary>
    public static double AtTemperatureKelvin(double setPointCelsius) => Math.Max(2, 0.01 * Math.Abs(setPointCelsius - RoomCelsius));

    /// <summary>What is wrong with readings, certificates or the set point itself, whether it moved or not.</summary>
    public static IEnumerable<string> Evidence(StabilityEvidence evidence)
    {
        double setPoint = evidence.SetPoint.Celsius;
        double tolerance = AtTemperatureKelvin(setPoint);
        if (!(evidence.SetPoint.LastReading >= evidence.Window.Start))
        {
            yield return "the set point is not known: it has no reading in the window";
        }
        else if (setPoint < evidence.Input.Source.MinimumCelsius - tolerance || setPoint > evidence.Input.Source.MaximumCelsius + tolerance)
        {
            yield return $"the set point of {Celsius(setPoint)} degC is none that the source is used at";
        }

        if (evidence.Before.Count == 0 || Coverage(evidence) < LeastLeadInCoverage)
        {
            yield return $"there are too few readings in the {Quantities.Duration(evidence.Schedule.LeadIn)} before the window";
        }

        foreach (string clause in Data(evidence, CoveredMeans(evidence.Within)).Concat(Traceability(evidence)))
        {
            yield return clause;
        }
    }

    private static IEnumerable<string> Data(StabilityEvidence evidence, StabilityValue value) => Data(evidence, value.Statistics.MeanCount);

    private static IEnumerable<string> Data(StabilityEvidence evidence, int means)
    {
        int expected = ExpectedMeans(evidence, evidence.Schedule.Window);
        int needed = (int)Math.Ceiling(expected * LeastCoverage);
        if (means < needed)
        {
            yield return $"only {Quantities.Count(means)} of {Quantities.Count(expected)} ten-second means have a reading of "
                + $"{evidence.Reference.Id}, and {Quantities.Count(needed)} are needed";
        }
    }

    private static IEnumerable<string> Traceability(StabilityEvidence evidence)
    {
        TemperatureSeries within = evidence.Within;
        List<Certificate?> certificates =
            [.. evidence.Certificates.Stretches.Where(stretch => stretch.Span.End > evidence.Window.Start).Select(stretch => stretch.Certificate)];
        if (certificates.Count > 1)
        {
            yield return "the certificate or the instrument in force changed within the window, and the step between two calibrations is no instability of the source";
        }
        else if (certificates.Any(certificate => certificate is null))
        {
            yield return $"no certificate is in force for {evidence.Reference.Id}";
        }
        else if (within.WithoutCertificate > 0)
        {
            yield return $"{Quantities.Count(within.WithoutCertificate)} readings of {evidence.Reference.Id} give no temperature through the certificate";
        }

        if (within.WithoutJunction > 0)
        {
            yield return $"{Quantities.Count(within.WithoutJunction)} readings of {evidence.Reference.Id} have no temperature, because "
                + $"{JunctionText.Subject(evidence.Input.Source, evidence.Reference)} had no fresh reading";
        }

        if (within.OutsideCertificate > 0)
        {
            yield return $"{Quantities.Count(within.OutsideCertificate)} of {Quantities.Count(within.Count)} readings lie outside the range of the certificate"
                + (certificates is [{ } certificate] ? $" ({Celsius(certificate.MinimumCelsius)} to {Celsius(certificate.MaximumCelsius)} degC)" : string.Empty);
        }
    }

    /// <summary>The set point is unknown or changed.</summary>
    public static IEnumerable<string> SetPoint(StabilityEvidence evidence)
    {
        if (evidence.HasSetPointChannel && !(evidence.SetPoint.LastReading >= evidence.Window.Start))
        {
            yield return "the set point is not known: it has no reading in the window";
        }
        else if (evidence.SetPoint.ChangedAt is { } changed)
        {
            yield return $"the set point changed from {Celsius(evidence.SetPoint.FormerCelsius)} to {Celsius(evidence.SetPoint.Celsius)} degC at {Moments.Text(changed)}; "
                + $"windows count that begin at least {Quantities.Duration(evidence.Schedule.LeadIn)} later";
        }
    }

    /// <summary>The source is not at its set point, or was still approaching it.</summary>
    public static IEnumerable<string> Approach(StabilityEvidence evidence, AcceptanceLimit? limit)
    {
        if (evidence.Before.Count == 0 || Coverage(evidence) < LeastLeadInCoverage)
        {
            yield return $"there are too few readings in the {Quantities.Duration(evidence.Schedule.LeadIn)} before the window to tell whether the source had settled";
            yield break;
        }

        double setPoint = evidence.SetPoint.Celsius;
        double before = Math.Abs(evidence.Before.MeanCelsius - setPoint);
        double now = Math.Abs(evidence.Within.MeanCelsius - setPoint);
        double tolerance = AtTemperatureKelvin(setPoint);
        if (before > tolerance && now > tolerance)
        {
            yield return $"the source is not at its set point: it stands at {Celsius(evidence.Within.MeanCelsius)} degC, "
                + $"{Quantities.Significant(now)} K from {Celsius(setPoint)} degC, and more than {Quantities.Significant(tolerance)} K is too far";
        }
        else if (before - now > LimitKelvin(limit))
        {
            yield return $"the source was still approaching its set point: it stood {Quantities.Significant(before)} K from it in the "
                + $"{Quantities.Duration(evidence.Schedule.LeadIn)} before the window, and {Quantities.Significant(now)} K in the window";
        }
    }

    private static IEnumerable<string> Limit(StabilityEvidence evidence, AcceptanceLimit? limit, bool comparable)
    {
        if (limit is null && double.IsFinite(evidence.NominalCelsius))
        {
            yield return $"no acceptance limit for stability is in force at {Celsius(evidence.NominalCelsius)} degC";
        }
        else if (limit is not null && !comparable)
        {
            yield return $"the acceptance limit {limit.Id} is given in {limit.Unit}, which is no unit of a temperature difference";
        }
    }

    /// <summary>The drop in distance that makes an approach: one limit. Where there is no limit nothing is decided anyway.</summary>
    private static double LimitKelvin(AcceptanceLimit? limit) =>
        limit is null ? double.PositiveInfinity : limit.Maximum / StabilityUnit.PerKelvin(limit.Unit);

    private static double Coverage(StabilityEvidence evidence) => CoveredMeans(evidence.Before) / (double)ExpectedMeans(evidence, evidence.Schedule.LeadIn);

    private static int CoveredMeans(TemperatureSeries series)
    {
        int covered = 0;
        long last = long.MinValue;
        foreach (long time in series.TimeMicroseconds.Span)
        {
            long bin = Metrology.Statistics.TimeBins.StartOf(time, Metrology.Statistics.Stability.TenSeconds);
            covered += bin == last ? 0 : 1;
            last = bin;
        }

        return covered;
    }

    /// <summary>A thermometer that reports less often than every 10 s fills fewer bins.</summary>
    private static int ExpectedMeans(StabilityEvidence evidence, TimeSpan span)
    {
        TimeSpan bin = TimeSpan.FromMicroseconds(Metrology.Statistics.Stability.TenSeconds);
        return Math.Max(1, (int)(span / (evidence.Reference.Interval > bin ? evidence.Reference.Interval : bin)));
    }

    private static string Celsius(double value) => Quantities.Fixed(value, 2).TrimEnd('0').TrimEnd('.');
}
