namespace LabWatch.Service.Api.Streaming;

/// <summary>One server-sent event, written once for all clients.</summary>
/// <param name="Id">Number of the event: a client that comes back names the last one it saw.</param>
/// <param name="Event">Name of the event.</param>
/// <param name="Data">JSON in UTF-8, without line breaks.</param>
internal sealed record StreamMessage(long Id, string Event, ReadOnlyMemory<byte> Data);
