using System.Security.Cryptography;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.LabFile;

namespace LabWatch.Service.Hosting;

/// <summary>A document in force, and what it reads as.</summary>
/// <param name="Text">The document, UTF-8.</param>
/// <param name="Snapshot">What it reads as.</param>
/// <param name="Recorded">The records it was put together from; null for a lab file that is not on record yet.</param>
internal sealed record LabInForce(ReadOnlyMemory<byte> Text, LabSnapshot Snapshot, LabRecorded? Recorded)
{
    /// <summary>Reads a document.</summary>
    public static (LabInForce? InForce, IReadOnlyList<Finding> Findings) Read(ReadOnlyMemory<byte> text)
    {
        LabFileResult result = LabFileReader.Read(text);
        return (result.Snapshot is { } snapshot ? new LabInForce(text, snapshot, result.Recorded) : null, result.Findings);
    }

    /// <summary>SHA-256 of a file, small hexadecimal digits.</summary>
    public static string DigestOf(ReadOnlyMemory<byte> text) => Convert.ToHexStringLower(SHA256.HashData(text.Span));
}
