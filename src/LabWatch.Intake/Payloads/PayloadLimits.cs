using LabWatch.Lab.Findings;

namespace LabWatch.Intake.Payloads;

/// <summary>Bounds on one message, so that no device can exhaust the service.</summary>
public sealed record PayloadLimits
{
    /// <summary>Longest payload, bytes, 64 to 16777216. Default 1 MiB.</summary>
    public int MaximumBytes { get; init; } = 1 << 20;

    /// <summary>Most records in one pack, 1 to 1000000. Default 10000.</summary>
    public int MaximumRecords { get; init; } = 10_000;

    /// <summary>Deepest nesting of JSON, 2 to 64. A SenML pack needs 2; more is for fields that are passed over. Default 8.</summary>
    public int MaximumDepth { get; init; } = 8;

    /// <summary>Everything wrong with these limits.</summary>
    /// <param name="where">Name of the option that holds them.</param>
    public IEnumerable<Finding> Validate(string where) =>
    [
        .. OptionCheck.Range($"{where}.{nameof(MaximumBytes)}", MaximumBytes, 64, 16 << 20),
        .. OptionCheck.Range($"{where}.{nameof(MaximumRecords)}", MaximumRecords, 1, 1_000_000),
        .. OptionCheck.Range($"{where}.{nameof(MaximumDepth)}", MaximumDepth, 2, 64),
    ];
}
