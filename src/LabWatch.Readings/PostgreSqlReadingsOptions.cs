using LabWatch.Lab.Findings;
using Npgsql;

namespace LabWatch.Readings;

/// <summary>Readings in a PostgreSQL database.</summary>
public sealed record PostgreSqlReadingsOptions
{
    private const int LongestSchema = 40;

    /// <summary>Npgsql connection string. The password stands better in a secret: <see cref="PasswordSecret"/>.</summary>
    public string? ConnectionString { get; init; }

    /// <summary>Name of the secret with the password; null where the connection string or the server needs none.</summary>
    public string? PasswordSecret { get; init; }

    /// <summary>
    /// Schema that holds the tables; made where it is missing. One service writes a schema. Small letters, digits and underscores,
    /// starting with a letter, at most 40; <c>labwatch_readings</c> unless stated.
    /// </summary>
    public string Schema { get; init; } = "labwatch_readings";

    /// <summary>Everything wrong with the options; empty where they can be used.</summary>
    /// <param name="where">What the findings' places begin with.</param>
    public IReadOnlyList<Finding> Validate(string where)
    {
        List<Finding> findings = [];
        if (Problem() is { } problem)
        {
            // The text may hold a password, so it is not repeated.
            findings.Add(new Finding(
                "bad-connection", $"{where}.{nameof(ConnectionString)}", problem, null,
                "Set it like \"Host=db.example;Database=labwatch;Username=labwatch\", and the password by PasswordSecret."));
        }

        if (Schema.Length is 0 or > LongestSchema || !char.IsAsciiLetterLower(Schema[0]) || !Schema.All(one => char.IsAsciiLetterLower(one) || char.IsAsciiDigit(one) || one == '_'))
        {
            findings.Add(new Finding(
                "bad-schema", $"{where}.{nameof(Schema)}", "The schema's name is not a plain identifier.", Finding.Quote(Schema),
                "Use small letters, digits and underscores, starting with a letter, at most 40."));
        }

        return findings;
    }

    private string? Problem()
    {
        try
        {
            return string.IsNullOrWhiteSpace(ConnectionString) ? "The engine postgresql needs a connection string."
                : string.IsNullOrEmpty(new NpgsqlConnectionStringBuilder(ConnectionString).Host) ? "The connection string names no host."
                : null;
        }
        catch (Exception error) when (error is ArgumentException or FormatException or InvalidCastException or OverflowException)
        {
            return "The connection string cannot be read.";
        }
    }
}
