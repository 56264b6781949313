namespace LabWatch.Lab.LabFile;

/// <summary>Something read from a lab file, with the JSON Pointer of where it stood, for findings that only a later check can make.</summary>
internal readonly record struct Placed<T>(T Value, string Pointer);
