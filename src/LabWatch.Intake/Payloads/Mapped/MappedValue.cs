namespace LabWatch.Intake.Payloads.Mapped;

/// <summary>A value of a mapping, made ready.</summary>
/// <param name="Pointer">Where it stands.</param>
/// <param name="Channel">Id of its channel.</param>
/// <param name="Unit">Its unit, UTF-8; empty for the channel's.</param>
internal sealed record MappedValue(JsonPointer Pointer, string Channel, byte[] Unit);
