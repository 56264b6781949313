namespace LabWatch.Records.Storage;

/// <summary>A side result as stored.</summary>
internal sealed record StoredFigure(string Name, double? Value, double? StandardUncertainty, double? DegreesOfFreedom, string Unit);
