using LabWatch.Lab.Instruments;
using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Evaluation;

/// <summary>A stretch of time with one certificate in force.</summary>
/// <param name="Span">The stretch.</param>
/// <param name="Certificate">The certificate; null where none is in force.</param>
public sealed record CertificateStretch(TimeWindow Span, Certificate? Certificate);
