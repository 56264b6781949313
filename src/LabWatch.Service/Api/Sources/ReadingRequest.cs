using System.Globalization;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Service.Api.Requests;

namespace LabWatch.Service.Api.Sources;

/// <summary>A checked read of readings.</summary>
/// <param name="Channel">The channel.</param>
/// <param name="Window">The window of device time.</param>
/// <param name="Bucket">Length of a bucket; null for raw readings.</param>
/// <param name="IsCsv">Whether the answer is CSV.</param>
internal sealed record ReadingRequest(Channel Channel, TimeWindow Window, TimeSpan? Bucket, bool IsCsv)
{
    /// <summary>Rows that an automatic choice of bucket stays within: what a chart can show.</summary>
    public const int ChartRows = 2_000;

    /// <summary>Most raw readings that one answer may be expected to hold.</summary>
    public const int MaximumRawRows = 1_000_000;

    /// <summary>Most buckets that one answer may hold.</summary>
    public const int MaximumBuckets = 100_000;

    private const int LongestBucketSeconds = 31 * 86_400;

    private static readonly TimeSpan ByDefault = TimeSpan.FromHours(1);
    private static readonly int[] LadderSeconds =
        [1, 2, 5, 10, 15, 30, 60, 120, 300, 600, 900, 1_800, 3_600, 7_200, 10_800, 21_600, 43_200, 86_400];

    /// <summary>Checks the parameters; null where the reader has findings.</summary>
    public static ReadingRequest? Read(QueryReader query, ReferenceSource source, Instant now, string? accept)
    {
        query.Allow("channel", "from", "to", "bucket", "format");
        Channel? channel = ChannelOf(query, source);
        TimeWindow? window = WindowOf(query, now);
        bool isCsv = IsCsvAsked(query, accept);
        string bucketText = query.Text("bucket") ?? "auto";
        int? seconds = SecondsOf(query, bucketText);
        TimeSpan? bucket = channel is not null && window is { } known ? BucketOf(query, bucketText, seconds, channel, known) : null;
        return channel is null || window is null || query.Findings.Count > 0 ? null : new ReadingRequest(channel, window.Value, bucket, isCsv);
    }

    /// <summary>The shortest bucket of the ladder with which a window has at most <see cref="ChartRows"/> rows; null where raw readings fit.</summary>
    public static TimeSpan? Automatic(TimeWindow window, TimeSpan interval)
    {
        double seconds = window.Duration.TotalSeconds;
        if (seconds <= ChartRows * interval.TotalSeconds)
        {
            return null;
        }

        // One row more than the quotient: a window that starts inside a bucket touches both ends.
        int step = LadderSeconds.FirstOrDefault(candidate => (seconds / candidate) + 1 <= ChartRows);
        return step > 0 ? TimeSpan.FromSeconds(step) : TimeSpan.FromDays(Math.Ceiling((seconds / 86_400) / (ChartRows - 1)));
    }

    private static Channel? ChannelOf(QueryReader query, ReferenceSource source)
    {
        string? id = query.Text("channel");
        Channel? channel = id is null ? null : source.FindChannel(id);
        if (channel is null)
        {
            query.Add(
                id is null ? "missing" : "unknown-channel",
                "channel",
                id is null ? "The channel is missing." : "The source has no such channel.",
                id,
                "Use one of: " + string.Join(", ", source.Channels.Select(candidate => candidate.Id)) + ".");
        }

        return channel;
    }

    private static TimeWindow? WindowOf(QueryReader query, Instant now)
    {
        int before = query.Findings.Count;
        Instant end = query.Time("to") ?? now;
        Instant? start = query.Time("from");
        return query.Findings.Count > before ? null : query.Ordered(start ?? end - ByDefault, end, "to");
    }

    private static bool IsCsvAsked(QueryReader query, string? accept)
    {
        string? format = query.Text("format");
        if (format is not (null or "json" or "csv"))
        {
            query.Add("unknown-format", "format", "There is no such format.", format, "Use json or csv.");
        }

        return format == "csv" || (format is null && accept?.Contains("text/csv", StringComparison.OrdinalIgnoreCase) == true);
    }

    /// <summary>The length of a bucket as asked for: null for raw readings and for the automatic choice.</summary>
    private static int? SecondsOf(QueryReader query, string text)
    {
        if (text is "auto" or "raw")
        {
            return null;
        }

        if (int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out int seconds) && seconds is >= 1 and <= LongestBucketSeconds)
        {
            return seconds;
        }

        query.Add("not-a-bucket", "bucket", "This is no length of a bucket.", text, "Give auto, raw, or whole seconds from 1 to 2678400.");
        return null;
    }

    private static TimeSpan? BucketOf(QueryReader query, string text, int? seconds, Channel channel, TimeWindow window)
    {
        double rows = window.Duration / (seconds is { } given ? TimeSpan.FromSeconds(given) : channel.Interval);
        int most = seconds is null ? MaximumRawRows : MaximumBuckets;
        if (text != "auto" && rows > most)
        {
            query.Add("too-many-rows", "bucket", Rows(rows, most), text, "Ask for a shorter window, or for longer buckets.");
        }

        return text == "auto" ? Automatic(window, channel.Interval) : seconds is { } length ? TimeSpan.FromSeconds(length) : null;
    }

    private static string Rows(double rows, int maximum) =>
        string.Create(CultureInfo.InvariantCulture, $"The answer would have about {rows:F0} rows; at most {maximum} are given.");
}
