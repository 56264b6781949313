namespace LabWatch.Readings.Quarantine;

/// <summary>Keeps what was refused, newest first, within a bound on count and bytes (the oldest go first, and are counted).</summary>
public interface IQuarantine
{
    /// <summary>Keeps messages durably before returning. A message that is kept already (same topic, payload and codes) is counted, not kept twice.</summary>
    ValueTask AddAsync(IReadOnlyList<QuarantinedMessage> messages, CancellationToken cancellationToken);

    /// <summary>The newest messages, newest first.</summary>
    ValueTask<IReadOnlyList<QuarantinedMessage>> NewestAsync(int count, CancellationToken cancellationToken);

    /// <summary>How many were ever refused, repeats and dropped ones included.</summary>
    ValueTask<long> TotalAsync(CancellationToken cancellationToken);
}
