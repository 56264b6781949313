namespace LabWatch.Records.Runs;

/// <summary>What was wrong in the record of a run. Members that are null stay as they are.</summary>
/// <param name="Reason">Why it is corrected.</param>
public sealed record RunCorrection(string Reason)
{
    /// <summary>Job number.</summary>
    public string? JobNumber { get; init; }

    /// <summary>Item.</summary>
    public string? Item { get; init; }

    /// <summary>Set point, degree Celsius.</summary>
    public double? SetPointCelsius { get; init; }

    /// <summary>Working band.</summary>
    public string? Band { get; init; }

    /// <summary>Note.</summary>
    public string? Note { get; init; }

    /// <summary>Whether the run is called off. It cannot be taken back.</summary>
    public bool Cancelled { get; init; }
}
