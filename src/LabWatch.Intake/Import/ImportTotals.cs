namespace LabWatch.Intake.Import;

/// <summary>How far an import has come.</summary>
/// <param name="Line">Line up to which all is done.</param>
/// <param name="Rows">Rows read, those passed over included.</param>
/// <param name="Readings">Readings that are good.</param>
/// <param name="Stored">Readings newly stored; null where the service stores them and only it knows.</param>
/// <param name="Duplicates">Readings that were there already; null as above.</param>
/// <param name="Conflicts">Readings for which another value stands; null as above.</param>
/// <param name="Refused">Rows with something that could not become a reading.</param>
public sealed record ImportTotals(long Line, long Rows, long Readings, long? Stored, long? Duplicates, long? Conflicts, long Refused);
