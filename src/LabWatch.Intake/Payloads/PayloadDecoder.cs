using System.Buffers;
using System.Globalization;
using System.Text.Unicode;
using LabWatch.Intake.Payloads.Mapped;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Payloads;

/// <summary>
/// Turns a message into readings and findings. It is a function of the message and of the snapshot in force; it never throws on any
/// bytes, and may be called from several threads.
/// </summary>
internal sealed class PayloadDecoder(ILabSnapshotSource snapshots, string root, PayloadLimits limits, ReadingTimeRule times, MappingTable mappings)
{
    private volatile TopicMap _map = new(snapshots.Current, root);

    public DecodedMessage Decode(string topic, in ReadOnlySequence<byte> payload, bool retained, Instant arrival)
    {
        TopicMap map = CurrentMap();
        PayloadMapping? mapping = null;
        if (map.Find(topic) is not { } route)
        {
            if (mappings.Find(topic, map.Snapshot.Site.Id) is not { } mapped)
            {
                return new DecodedMessage(null, [map.Explain(topic)]);
            }

            if (map.Find($"{root}/{mapped.Source.Site}/{mapped.Source.Source}") is not { } source)
            {
                return new DecodedMessage(null, [new Finding(IntakeCode.UnknownSource, "topic", "The lab file has no source of this name.", Finding.Quote(topic), "Mend the topic or the mapping, or add the source to the lab file.")]);
            }

            (route, mapping) = (source, mapped.Mapping);
        }

        var context = new DecodeContext(route, arrival, retained, limits, times);
        if (payload.Length > limits.MaximumBytes)
        {
            return Refuse(IntakeCode.PayloadTooLarge, "The payload is longer than the limit.", "Send smaller packs or raise the limit.");
        }

        if (mapping is not null)
        {
            return DecodeMapped(payload.ToArray(), mapping, context);
        }

        if (payload.IsSingleSegment)
        {
            return Decode(payload.FirstSpan, context);
        }

        byte[] rented = ArrayPool<byte>.Shared.Rent((int)payload.Length);
        payload.CopyTo(rented);
        DecodedMessage decoded = Decode(rented.AsSpan(0, (int)payload.Length), context);
        ArrayPool<byte>.Shared.Return(rented);
        return decoded;
    }

    private static DecodedMessage Decode(ReadOnlySpan<byte> bytes, in DecodeContext context)
    {
        if (SenmlCborTranscoder.IsCbor(bytes))
        {
            return DecodeCbor(bytes, context);
        }

        ReadOnlySpan<byte> utf8 = bytes.StartsWith("\uFEFF"u8) ? bytes[3..] : bytes;
        int start = utf8.IndexOfAnyExcept(" \t\r\n"u8);
        if (start < 0)
        {
            return Refuse(IntakeCode.PayloadEmpty, "The payload is empty.", "Send a SenML pack.");
        }

        if (!Utf8.IsValid(utf8))
        {
            return Refuse(IntakeCode.NotUtf8, "The payload is not UTF-8.", "Send JSON in UTF-8.");
        }

        bool json = utf8[start] is (byte)'[' or (byte)'{';
        return json || context.Route.Channel is not null
            ? Decode(utf8, json, context)
            : Refuse(IntakeCode.NotSenml, "The payload is no SenML pack; bare numbers go to a channel's topic.", "Send a JSON array of SenML records.");
    }

    private static DecodedMessage DecodeMapped(ReadOnlyMemory<byte> utf8, PayloadMapping mapping, in DecodeContext context)
    {
        if (!Utf8.IsValid(utf8.Span))
        {
            return Refuse(IntakeCode.NotUtf8, "The payload is not UTF-8.", "Send JSON in UTF-8.");
        }

        FindingList? findings = null;
        var readings = default(ReadingBuffer);
        try
        {
            MappedJsonDecoder.Decode(utf8, mapping, context, ref readings, ref findings);
            return new DecodedMessage(
                readings.Count == 0 ? null : new ReadingPack(context.Route.Source.Key, context.Arrival, readings.ToArray()),
                findings?.ToList() ?? []);
        }
        finally
        {
            readings.Dispose();
        }
    }

    private static DecodedMessage DecodeCbor(ReadOnlySpan<byte> bytes, in DecodeContext context)
    {
        byte[] rented = ArrayPool<byte>.Shared.Rent(bytes.Length);
        try
        {
            bytes.CopyTo(rented);
            var json = new ArrayBufferWriter<byte>(Math.Max(256, 2 * bytes.Length));
            return SenmlCborTranscoder.TryWrite(rented.AsMemory(0, bytes.Length), context.Limits.MaximumDepth, json, out int at)
                ? Decode(json.WrittenSpan, json: true, context)
                : new DecodedMessage(null, [new Finding(
                    IntakeCode.MalformedCbor,
                    string.Create(CultureInfo.InvariantCulture, $"byte {at}"),
                    "The payload breaks the grammar of CBOR or is nested too deeply.",
                    Finding.Quote(Convert.ToHexStringLower(bytes[at..Math.Min(bytes.Length, at + 16)])),
                    "Send a SenML pack as CBOR or JSON.")]);
        }
        finally
        {
            ArrayPool<byte>.Shared.Return(rented);
        }
    }

    private static DecodedMessage Decode(ReadOnlySpan<byte> utf8, bool json, in DecodeContext context)
    {
        FindingList? findings = null;
        var readings = default(ReadingBuffer);
        try
        {
            if (json)
            {
                SenmlJsonDecoder.Decode(utf8, context, ref readings, ref findings);
            }
            else
            {
                BareNumberDecoder.Decode(utf8, context, ref readings, ref findings);
            }

            return new DecodedMessage(
                readings.Count == 0 ? null : new ReadingPack(context.Route.Source.Key, context.Arrival, readings.ToArray()),
                findings?.ToList() ?? []);
        }
        finally
        {
            readings.Dispose();
        }
    }

    private TopicMap CurrentMap()
    {
        LabSnapshot current = snapshots.Current;
        TopicMap map = _map;
        if (!ReferenceEquals(map.Snapshot, current))
        {
            _map = map = new TopicMap(current, root);
        }

        return map;
    }

    private static DecodedMessage Refuse(string code, string message, string cure) =>
        new(null, [new Finding(code, "payload", message, null, cure)]);
}
