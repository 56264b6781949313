using LabWatch.Records.Audit;
using LabWatch.Records.Audit.Verification;

namespace LabWatch.Evidence.Verification;

/// <summary>What a verification found.</summary>
/// <param name="Findings">Everything found, counted in full and kept in part; empty where all is as it was recorded.</param>
/// <param name="Heads">Ends of the chains by site, to write down.</param>
/// <param name="Examined">Rows examined by table.</param>
/// <param name="Readings">Sealed readings decoded.</param>
/// <param name="Notes">What the verification cannot tell, or what is worth knowing beside the findings.</param>
public sealed record VerifyReport(
    TrailFindings Findings, IReadOnlyDictionary<string, AuditHead> Heads, IReadOnlyDictionary<string, long> Examined, long Readings, IReadOnlyList<string> Notes)
{
    /// <summary>Whether nothing was found.</summary>
    public bool IsClean => Findings.Total == 0;
}
