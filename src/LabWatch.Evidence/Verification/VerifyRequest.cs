using LabWatch.Readings;
using LabWatch.Records;
using LabWatch.Records.Audit;

namespace LabWatch.Evidence.Verification;

/// <summary>What to verify.</summary>
/// <param name="DataDirectory">Absolute path of the data directory.</param>
/// <param name="Records">Where the records are kept.</param>
/// <param name="Noted">Ends of chains that were noted elsewhere; the site is null where it was not noted.</param>
public sealed record VerifyRequest(string DataDirectory, RecordsOptions Records, IReadOnlyList<(string? Site, AuditHead Head)> Noted)
{
    /// <summary>Where the readings are kept; null for the file in the data directory.</summary>
    public ReadingsOptions? Readings { get; init; }
}
