using LabWatch.Readings.Head;

namespace LabWatch.Readings.Engine;

/// <summary>A frozen part with the bytes that seal it.</summary>
internal sealed record SealedPart(HeadHour Hour, HeadPart Part, byte[] Block, byte[] Digest, byte[] Summary);
