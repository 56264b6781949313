using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;

namespace LabWatch.Lab.Instruments;

/// <summary>One revision of a calibration certificate of an instrument.</summary>
/// <param name="Id">Id in the site (a slug), the same for all revisions.</param>
/// <param name="Revision">1 for the first, one more for each correction.</param>
/// <param name="Instrument">Id of the instrument it belongs to.</param>
/// <param name="Number">Number printed on the certificate.</param>
/// <param name="Issuer">Who issued it.</param>
/// <param name="ValidFrom">First instant at which it is in force (date of calibration).</param>
/// <param name="DueAt">First instant at which a recalibration is overdue; null where no interval is set.</param>
/// <param name="MinimumCelsius">Lowest temperature it covers.</param>
/// <param name="MaximumCelsius">Highest temperature it covers.</param>
/// <param name="Characteristic">How a raw value becomes t90.</param>
public sealed record Certificate(
    string Id,
    int Revision,
    string Instrument,
    string Number,
    string Issuer,
    Instant ValidFrom,
    Instant? DueAt,
    double MinimumCelsius,
    double MaximumCelsius,
    Characteristic Characteristic)
{
    /// <summary>The R(TPW) in force, where a resistance thermometer has a recorded triple-point check; the snapshot sets it, not the certificate.</summary>
    public TriplePointCheck? TriplePoint { get; init; }

    /// <summary>Source that a comparator was calibrated against: of that source it can show change only. Null where its traceability is independent.</summary>
    public SourceKey? CalibratedAgainst { get; init; }

    /// <summary>First instant at which the certificate is withdrawn: what was before stays judged by it. Null while it is not.</summary>
    public Instant? WithdrawnFrom { get; init; }

    /// <summary>How an evaluation names what it used: <c>id@revision</c>, with a triple-point check <c>id@revision+check@revision</c>.</summary>
    public string Reference => TriplePoint is { } check ? $"{Id}@{Revision}+{check.Id}@{check.Revision}" : $"{Id}@{Revision}";
}
