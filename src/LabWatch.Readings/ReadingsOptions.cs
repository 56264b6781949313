using LabWatch.Lab.Findings;

namespace LabWatch.Readings;

/// <summary>Where and how readings are kept.</summary>
public sealed record ReadingsOptions
{
    /// <summary>Folder of the readings and the quarantine; made where it is missing. On a local disk: a network share cannot promise what a commit needs.</summary>
    public required string DataDirectory { get; init; }

    /// <summary>Where readings lie; the data directory is needed with every engine. The file in the data directory unless stated.</summary>
    public ReadingsEngine Engine { get; init; } = ReadingsEngine.Sqlite;

    /// <summary>The PostgreSQL database; used where <see cref="Engine"/> says so.</summary>
    public PostgreSqlReadingsOptions PostgreSql { get; init; } = new();

    /// <summary>The InfluxDB database; used where <see cref="Engine"/> says so.</summary>
    public InfluxDbReadingsOptions InfluxDb { get; init; } = new();

    /// <summary>Folder that holds secrets, one file each; null for none.</summary>
    public string? SecretsDirectory { get; init; }

    /// <summary>How long an hour that is over takes no reading before it is sealed. 1 s to 1 d; 2 min unless stated.</summary>
    public TimeSpan QuietPeriod { get; init; } = TimeSpan.FromMinutes(2);

    /// <summary>
    /// How many readings may lie unsealed in memory (about 25 bytes each) before the quietest hours are sealed early.
    /// 10,000 to 8,000,000; 4,000,000 unless stated.
    /// </summary>
    public int UnsealedReadingsLimit { get; init; } = 4_000_000;

    /// <summary>How large the journal may grow, in bytes, before what it holds is sealed early. 1 MiB to 16 GiB; 128 MiB unless stated.</summary>
    public long JournalBytesLimit { get; init; } = 128L << 20;

    /// <summary>How often all sealed parts are compared with their digests. 1 h to 365 d; 1 d unless stated.</summary>
    public TimeSpan IntegrityCheckEvery { get; init; } = TimeSpan.FromDays(1);

    /// <summary>How many years raw readings must be kept, by quantity; readings without a rule are kept for ever. Only <c>labwatch retention</c> removes anything.</summary>
    public IReadOnlyList<RetentionRule> Retention { get; init; } = [];

    /// <summary>How many refused messages are kept. 1 to 1,000,000; 10,000 unless stated.</summary>
    public int QuarantineCountLimit { get; init; } = 10_000;

    /// <summary>How many bytes of refused payloads are kept. 1 KiB to 1 GiB; 16 MiB unless stated.</summary>
    public long QuarantineBytesLimit { get; init; } = 16L << 20;

    /// <summary>Everything wrong with the options; empty where they can be used.</summary>
    public IReadOnlyList<Finding> Validate()
    {
        List<Finding> findings = [];
        if (string.IsNullOrWhiteSpace(DataDirectory))
        {
            findings.Add(new Finding("missing", nameof(DataDirectory), "The folder for readings is not stated.", null, "State a folder on a local disk."));
        }

        Check(findings, nameof(IntegrityCheckEvery), IntegrityCheckEvery.TotalHours, 1, 365 * 24, "hours");
        for (int i = 0; i < Retention.Count; i++)
        {
            Check(findings, FormattableString.Invariant($"{nameof(Retention)}:{i}:{nameof(RetentionRule.Years)}"), Retention[i].Years, 1, 200, "years");
        }

        if (Retention.Select(rule => rule.Quantity).Distinct().Count() < Retention.Count)
        {
            findings.Add(new Finding("doubled", nameof(Retention), "Two rules are about the same quantity.", null, "Keep one of them."));
        }

        Check(findings, nameof(QuietPeriod), QuietPeriod.TotalSeconds, 1, 86_400, "seconds");
        Check(findings, nameof(UnsealedReadingsLimit), UnsealedReadingsLimit, 10_000, 8_000_000, "readings");
        Check(findings, nameof(JournalBytesLimit), JournalBytesLimit, 1L << 20, 16L << 30, "bytes");
        Check(findings, nameof(QuarantineCountLimit), QuarantineCountLimit, 1, 1_000_000, "messages");
        Check(findings, nameof(QuarantineBytesLimit), QuarantineBytesLimit, 1L << 10, 1L << 30, "bytes");
        findings.AddRange(Engine switch
        {
            ReadingsEngine.PostgreSql => PostgreSql.Validate(nameof(PostgreSql)),
            ReadingsEngine.InfluxDb => InfluxDb.Validate(nameof(InfluxDb)),
            _ => [],
        });
        return findings;
    }

    private static void Check(List<Finding> findings, string name, double value, double least, double most, string unit)
    {
        if (!(value >= least && value <= most))
        {
            findings.Add(new Finding(
                "out-of-range",
                name,
                "The value is outside its range.",
                FormattableString.Invariant($"{value}"),
                FormattableString.Invariant($"Choose {least} to {most} {unit}.")));
        }
    }
}
