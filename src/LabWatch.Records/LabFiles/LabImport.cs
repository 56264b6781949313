using LabWatch.Lab.Time;

namespace LabWatch.Records.LabFiles;

/// <summary>A lab file as it was imported.</summary>
/// <param name="Site">Id of the site.</param>
/// <param name="Sequence">1 for the first import of the site, one more for each later one.</param>
/// <param name="Digest">SHA-256 (64 small hexadecimal digits) of the document's UTF-8 bytes.</param>
/// <param name="Document">The file, comments included.</param>
/// <param name="At">When.</param>
/// <param name="By">Who; <c>labwatch</c> for the service itself at start.</param>
public sealed record LabImport(string Site, int Sequence, string Digest, string Document, Instant At, string By)
{
    /// <summary>Why, in the words of who imported it; null where nobody said.</summary>
    public string? Reason { get; init; }
}
