namespace LabWatch.Records.Audit.Verification;

/// <summary>One thing that a verification found.</summary>
/// <param name="Code">Stable machine name, a slug such as <c>row-altered</c>.</param>
/// <param name="Table">Table of the database, or name of the file, that it is in.</param>
/// <param name="Id">The row: its subject in the trail, or the site and number of an entry; empty where it is about the whole table.</param>
/// <param name="Field">The column, where it can be told; null where not.</param>
/// <param name="Message">What was found, one sentence.</param>
/// <param name="Meaning">What it means or what to do, one sentence.</param>
public sealed record TrailFinding(string Code, string Table, string Id, string? Field, string Message, string Meaning)
{
    /// <summary>Table, row and column in one text.</summary>
    public string Where => (Id.Length > 0 ? $"{Table} {Id}" : Table) + (Field is null ? string.Empty : $", column {Field}");
}
