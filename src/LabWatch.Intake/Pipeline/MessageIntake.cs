using System.Buffers;
using System.Collections.Concurrent;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Payloads;
using LabWatch.Intake.Spool;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings.Quarantine;
using Microsoft.Extensions.Logging;

namespace LabWatch.Intake.Pipeline;

/// <summary>
/// The entrance for every broker: decodes a message, lets the taps see it, and queues it for the committer. Never waits.
/// </summary>
internal sealed class MessageIntake(
    PayloadDecoder decoder,
    IEnumerable<IReadingTap> taps,
    IntakeQueue queue,
    IntakeCounters counters,
    ReadingTimeRule times,
    TimeProvider clock,
    ILogger<MessageIntake> logger)
{
    /// <summary>Longest part of a refused payload that is kept, bytes.</summary>
    public const int QuarantinedBytes = 64 << 10;

    private const int TapLocks = 16;
    private readonly IReadingTap[] _taps = [.. taps];
    private readonly Lock[] _tapLocks = [.. Enumerable.Range(0, TapLocks).Select(_ => new Lock())];
    private readonly ConcurrentDictionary<SourceKey, Instant> _lastMessages = new();
    private readonly ConcurrentDictionary<SourceKey, ClockWatch> _clocks = new();

    public IReadOnlyDictionary<SourceKey, Instant> LastMessages => _lastMessages;

    /// <summary>What is known about the clocks of devices.</summary>
    public IReadOnlyDictionary<SourceKey, DeviceClock> Clocks => _clocks.ToDictionary(clock => clock.Key, clock => clock.Value.Describe());

    /// <summary>Takes a message in; false where the queue is full or closed, after the taps have seen it.</summary>
    public bool TryAccept(string topic, in ReadOnlySequence<byte> payload, bool retained, IDelivery delivery)
    {
        Instant arrival = Instant.Now(clock);
        DecodedMessage decoded = Observe(topic, payload, retained, arrival);
        QuarantinedMessage? refused = decoded.Findings.Count == 0 ? null
            : new QuarantinedMessage(arrival, topic, payload.Slice(0, Math.Min(payload.Length, QuarantinedBytes)).ToArray(), decoded.Findings);
        return queue.TryAdd(new IntakeItem(new SpoolEntry(decoded.Pack, refused), delivery, payload.Length));
    }

    /// <summary>Shows a message to the taps alone: nothing of it is stored.</summary>
    public void Observe(string topic, in ReadOnlySequence<byte> payload, bool retained) =>
        Observe(topic, payload, retained, Instant.Now(clock));

    private DecodedMessage Observe(string topic, in ReadOnlySequence<byte> payload, bool retained, Instant arrival)
    {
        counters.Received();
        DecodedMessage decoded = Decode(topic, payload, retained, arrival);
        if (decoded.Pack is { } whole && !retained && NewestDeviceTime(whole) is { } newest && !_clocks.GetOrAdd(whole.Source, _ => new ClockWatch(times)).Admit(newest, arrival))
        {
            decoded = new DecodedMessage(null, [SenmlRefusal.Leap(newest, arrival), .. decoded.Findings]);
        }

        if (decoded.Pack is { } pack)
        {
            counters.Decoded(pack.Readings.Count);
            _lastMessages[pack.Source] = arrival;
            lock (_tapLocks[pack.Source.GetHashCode() & (TapLocks - 1)])
            {
                Show(pack);
            }
        }

        return decoded;
    }

    /// <summary>The newest time that the device itself stated; null where it stated none.</summary>
    private static Instant? NewestDeviceTime(ReadingPack pack)
    {
        Instant? newest = null;
        for (int i = 0; i < pack.Readings.Count; i++)
        {
            Reading reading = pack.Readings[i];
            if ((reading.Quality & ReadingQuality.StampedOnArrival) == 0 && !(newest >= reading.Time))
            {
                newest = reading.Time;
            }
        }

        return newest;
    }

    private DecodedMessage Decode(string topic, in ReadOnlySequence<byte> payload, bool retained, Instant arrival)
    {
        try
        {
            return decoder.Decode(topic, payload, retained, arrival);
        }
        catch (Exception exception)
        {
            // A defect. The message goes to quarantine, or it would block its session for ever.
            IntakeLog.DecoderFailed(logger, exception);
            return new DecodedMessage(
                null,
                [new Finding(IntakeCode.DecoderDefect, "payload", "The decoder failed on this message.", exception.GetType().Name, "Report it with this message.")]);
        }
    }

    private void Show(ReadingPack pack)
    {
        foreach (IReadingTap tap in _taps)
        {
            try
            {
                tap.OnPack(pack);
            }
            catch (Exception exception)
            {
                // A tap must not throw. Where one does, the others still see the pack and it is still stored.
                IntakeLog.TapFailed(logger, exception, tap.GetType().Name, pack.Source.ToString());
            }
        }
    }
}
