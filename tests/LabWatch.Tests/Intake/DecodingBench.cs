using System.Buffers;
using System.Text;
using LabWatch.Intake.Options;
using LabWatch.Intake.Payloads;
using LabWatch.Intake.Payloads.Mapped;
using LabWatch.Lab;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Intake;

/// <summary>Decodes texts as if they had arrived at one fixed instant.</summary>
internal static class DecodingBench
{
    /// <summary>2026-12-01T08:15:30Z.</summary>
    public static Instant Arrival { get; } = Instant.FromUnixSeconds(1_796_112_930);

    public static PayloadDecoder Decoder(ILabSnapshotSource? lab = null, PayloadLimits? limits = null, params MappingOptions[] mappings) =>
        new(lab ?? new IntakeLab(), "lab", limits ?? new PayloadLimits(), new ReadingTimeRule { LateLimit = null }, new MappingTable(mappings));

    public static DecodedMessage Decode(string payload, string topic = IntakeLab.Topic, bool retained = false, ILabSnapshotSource? lab = null) =>
        Decode(Encoding.UTF8.GetBytes(payload), topic, retained, Decoder(lab));

    public static DecodedMessage Decode(byte[] payload, string topic, bool retained, PayloadDecoder decoder) =>
        decoder.Decode(topic, new ReadOnlySequence<byte>(payload), retained, Arrival);
}
