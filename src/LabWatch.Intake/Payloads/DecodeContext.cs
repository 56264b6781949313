using LabWatch.Lab.Time;

namespace LabWatch.Intake.Payloads;

/// <summary>What a decoder knows about a message besides its bytes.</summary>
/// <param name="Route">Where the topic leads.</param>
/// <param name="Arrival">When the message arrived.</param>
/// <param name="Retained">Whether the broker kept it from some earlier time.</param>
/// <param name="Limits">Bounds on the payload.</param>
/// <param name="Times">How device times are judged.</param>
internal readonly record struct DecodeContext(TopicRoute Route, Instant Arrival, bool Retained, PayloadLimits Limits, ReadingTimeRule Times);
