namespace LabWatch.Records.Audit.Verification;

/// <summary>Findings about what cannot be read.</summary>
internal static class Unreadable
{
    /// <summary>A table that cannot be read from end to end.</summary>
    public static TrailFinding Table(string table, string reason) => new(
        TrailCodes.Unreadable, table, string.Empty, null, $"A part of the table cannot be read: {reason.TrimEnd('.')}.",
        "The file is damaged or was changed below the database; restore it from a backup and verify that one.");
}
