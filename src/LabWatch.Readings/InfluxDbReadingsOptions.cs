using LabWatch.Lab.Findings;

namespace LabWatch.Readings;

/// <summary>Readings in a database of an InfluxDB server of any generation that takes line protocol and answers InfluxQL.</summary>
public sealed record InfluxDbReadingsOptions
{
    private const int LongestName = 120;

    /// <summary>Address of the server, for example <c>http://127.0.0.1:8086</c>.</summary>
    public string? Url { get; init; }

    /// <summary>
    /// Database (1.x), bucket (2.x) or database (3.x); with its retention policy as <c>database/policy</c> on 1.x. <c>labwatch</c> unless
    /// stated. Its retention must be without end: nothing may delete readings behind this program.
    /// </summary>
    public string Database { get; init; } = "labwatch";

    /// <summary>Organization of 2.x; unused by the others.</summary>
    public string Organization { get; init; } = "labwatch";

    /// <summary>Path that takes line protocol: <c>/api/v2/write</c> (2.x, 3.x, late 1.8) or <c>/write</c> (1.x). The former unless stated.</summary>
    public string WritePath { get; init; } = "/api/v2/write";

    /// <summary>User of 1.x with accounts; null for none. <see cref="TokenSecret"/> then names its password.</summary>
    public string? User { get; init; }

    /// <summary>Name of the secret with the token (2.x, 3.x) or the password (1.x); null for a server without accounts.</summary>
    public string? TokenSecret { get; init; }

    /// <summary>Whether to make the database on 1.x where it is missing. True unless stated; buckets of 2.x are made by their administrator.</summary>
    public bool CreateDatabase { get; init; } = true;

    /// <summary>Points in one request, 100 to 50,000; 10,000 unless stated. A commit with more takes several requests.</summary>
    public int BatchPoints { get; init; } = 10_000;

    /// <summary>How long one request may take, 1 s to 5 min; 10 s unless stated.</summary>
    public TimeSpan RequestTimeout { get; init; } = TimeSpan.FromSeconds(10);

    /// <summary>Attempts of a request that the server was too busy for, 1 to 10, with a pause that doubles from 50 ms; 3 unless stated.</summary>
    public int Attempts { get; init; } = 3;

    /// <summary>Everything wrong with the options; empty where they can be used.</summary>
    /// <param name="where">What the findings' places begin with.</param>
    public IReadOnlyList<Finding> Validate(string where)
    {
        List<Finding> findings = [];
        Must(Uri.TryCreate(Url, UriKind.Absolute, out Uri? url) && url.Scheme is "http" or "https" && url.UserInfo.Length == 0 && url.Query.Length == 0, nameof(Url), Url is null ? "The engine influxdb needs an address." : "This is not the address of a server.", Url, "Set it like http://127.0.0.1:8086, without user or password.");
        Must(Database.Length is > 0 and <= LongestName && Database.Split('/') is { Length: <= 2 } parts && parts.All(IsName), nameof(Database), "This is not the name of a database.", Database, "Use letters, digits, hyphens, underscores and dots, with /policy behind it where 1.x needs one.");
        Must(WritePath is "/write" or "/api/v2/write" || (WritePath.StartsWith('/') && WritePath.EndsWith("/write", StringComparison.Ordinal)), nameof(WritePath), "This is not a path that takes line protocol.", WritePath, "Use /api/v2/write, or /write for 1.x.");
        Must(User is null || TokenSecret is not null, nameof(TokenSecret), "A user needs a password.", null, "Name the secret that holds the password.");
        Must(BatchPoints is >= 100 and <= 50_000, nameof(BatchPoints), "The value is outside its range.", FormattableString.Invariant($"{BatchPoints}"), "Choose 100 to 50000 points.");
        Must(RequestTimeout >= TimeSpan.FromSeconds(1) && RequestTimeout <= TimeSpan.FromMinutes(5), nameof(RequestTimeout), "The value is outside its range.", RequestTimeout.ToString("c"), "Choose 00:00:01 to 00:05:00.");
        Must(Attempts is >= 1 and <= 10, nameof(Attempts), "The value is outside its range.", FormattableString.Invariant($"{Attempts}"), "Choose 1 to 10.");
        return findings;

        void Must(bool holds, string name, string message, string? value, string cure)
        {
            if (!holds)
            {
                findings.Add(new Finding("bad-option", $"{where}.{name}", message, value is null ? null : Finding.Quote(value), cure));
            }
        }
    }

    private static bool IsName(string text) => text.Length > 0 && text.All(one => char.IsAsciiLetterOrDigit(one) || one is '-' or '_' or '.');
}
