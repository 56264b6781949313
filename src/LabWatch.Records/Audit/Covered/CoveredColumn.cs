namespace LabWatch.Records.Audit.Covered;

/// <summary>A column of a covered table.</summary>
/// <param name="Name">Its name in the database.</param>
/// <param name="Form">How its values are written.</param>
/// <param name="Read">Reads the value from a row of the model.</param>
internal sealed record CoveredColumn(string Name, CoveredForm Form, Func<object, object?> Read);
