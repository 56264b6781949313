namespace LabWatch.Benchmarks.Alerts;

/// <summary>What the records database does meanwhile.</summary>
internal enum LedgerBehaviour
{
    Answers,
    Fails,
    Hangs,
}
