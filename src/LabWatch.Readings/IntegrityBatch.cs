namespace LabWatch.Readings;

/// <summary>What a batch of the comparison found.</summary>
/// <param name="Last">Number of the last seal that was compared; go on after it.</param>
/// <param name="Parts">Parts compared; 0 at the end.</param>
/// <param name="Wrong">Parts that differ or do not decode.</param>
public readonly record struct IntegrityBatch(long Last, int Parts, int Wrong);
