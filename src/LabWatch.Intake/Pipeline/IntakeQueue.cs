using System.Threading.Channels;

namespace LabWatch.Intake.Pipeline;

/// <summary>Messages between decoding and committing, in order of acceptance, bounded in number and bytes. One reader.</summary>
internal sealed class IntakeQueue(int limitMessages, long limitBytes)
{
    private readonly Channel<IntakeItem> _channel = Channel.CreateBounded<IntakeItem>(
        new BoundedChannelOptions(limitMessages) { SingleReader = true, FullMode = BoundedChannelFullMode.Wait });

    private long _bytes;

    public int Count => _channel.Reader.Count;

    /// <summary>Whether more than half of the bound is used: senders without acknowledgement are then slowed down.</summary>
    public bool IsHalfFull => Count > limitMessages / 2 || Interlocked.Read(ref _bytes) > limitBytes / 2;

    /// <summary>Adds a message; false where a bound is reached or the queue is closed.</summary>
    public bool TryAdd(IntakeItem item)
    {
        if (Interlocked.Add(ref _bytes, item.Bytes) <= limitBytes && _channel.Writer.TryWrite(item))
        {
            return true;
        }

        Interlocked.Add(ref _bytes, -item.Bytes);
        return false;
    }

    /// <summary>Waits until a message can be taken; false where the queue is closed and empty.</summary>
    public ValueTask<bool> WaitAsync(CancellationToken cancellationToken) => _channel.Reader.WaitToReadAsync(cancellationToken);

    /// <summary>Takes what is there now, at most a number of messages, stopping once a number of readings is reached.</summary>
    public List<IntakeItem> Take(int messages, int readings)
    {
        var taken = new List<IntakeItem>();
        int takenReadings = 0;
        while (taken.Count < messages && takenReadings < readings && _channel.Reader.TryRead(out IntakeItem? item))
        {
            Interlocked.Add(ref _bytes, -item.Bytes);
            takenReadings += item.ReadingCount;
            taken.Add(item);
        }

        return taken;
    }

    /// <summary>Takes no more messages; what is there can still be taken out.</summary>
    public void Close() => _channel.Writer.TryComplete();
}
