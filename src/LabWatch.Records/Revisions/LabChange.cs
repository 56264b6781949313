namespace LabWatch.Records.Revisions;

/// <summary>One thing that an import does to the records.</summary>
/// <param name="What"><c>added</c>, <c>revised</c>, <c>withdrawn</c>, or <c>kept</c> for a later revision that the file does not have and leaves alone.</param>
/// <param name="Subject">Kind and <c>id@revision</c>, for example <c>limit/fir-stability@2</c>.</param>
public sealed record LabChange(string What, string Subject);
