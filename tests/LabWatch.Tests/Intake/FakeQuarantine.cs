using System.Collections.Concurrent;
using LabWatch.Readings.Quarantine;

namespace LabWatch.Tests.Intake;

/// <summary>A quarantine in memory that can be told to fail.</summary>
internal sealed class FakeQuarantine : IQuarantine
{
    private readonly ConcurrentQueue<QuarantinedMessage> _messages = new();

    public Exception? Failure { get; set; }

    public IReadOnlyList<QuarantinedMessage> Messages => [.. _messages];

    public ValueTask AddAsync(IReadOnlyList<QuarantinedMessage> messages, CancellationToken cancellationToken)
    {
        if (Failure is { } failure)
        {
            throw failure;
        }

        foreach (QuarantinedMessage message in messages)
        {
            _messages.Enqueue(message);
        }

        return ValueTask.CompletedTask;
    }

    public ValueTask<IReadOnlyList<QuarantinedMessage>> NewestAsync(int count, CancellationToken cancellationToken) => new([.. _messages.Reverse().Take(count)]);

    public ValueTask<long> TotalAsync(CancellationToken cancellationToken) => new(_messages.Count);
}
