using System.Globalization;
using System.Text.Json;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;

namespace LabWatch.Readings.Influx;

/// <summary>What the store asks, in InfluxQL, and what the answers mean.</summary>
internal sealed class InfluxQueries(InfluxConnection connection)
{
    private const string HourFields = "\"readings\",\"change\",\"sealed\"";

    /// <summary>Last change, last seal, and the hours with something that is not sealed.</summary>
    public async Task<(long Change, long Seal, List<(SourceKey Source, long Hour)> Open)> StateAsync(CancellationToken cancellationToken)
    {
        (long change, long seal) = (0, 0);
        List<(SourceKey, long)> open = [];
        await connection.QueryAsync(
            "SELECT max(\"change\") FROM \"hour\"; SELECT max(\"number\") FROM \"seal\"; SELECT \"open\" FROM \"hour\" WHERE \"open\" = 1 GROUP BY \"site\",\"source\"",
            (statement, tags, rows) =>
            {
                foreach (JsonElement row in rows.EnumerateArray())
                {
                    change = statement == 0 ? row[1].GetInt64() : change;
                    seal = statement == 1 ? row[1].GetInt64() : seal;
                    if (statement == 2)
                    {
                        open.Add((Key(tags), row[0].GetInt64()));
                    }
                }
            },
            cancellationToken);
        return (change, seal, open);
    }

    /// <summary>Who wrote last, and when (Unix seconds).</summary>
    public async Task<(string Owner, long Seconds)?> WriterAsync(CancellationToken cancellationToken)
    {
        (string, long)? found = null;
        await connection.QueryAsync("SELECT \"owner\",\"at\" FROM \"writer\"", (_, _, rows) => found = (rows[0][1].GetString() ?? string.Empty, rows[0][2].GetInt64()), cancellationToken);
        return found;
    }

    /// <summary>Points of the hours of a source in a range of hours: readings, last change, sealed readings.</summary>
    public async Task<SortedDictionary<long, (long Readings, long Change, long Sealed)>> HoursAsync(SourceKey source, long from, long to, CancellationToken cancellationToken)
    {
        SortedDictionary<long, (long, long, long)> hours = [];
        await connection.QueryAsync(
            $"SELECT {HourFields} FROM \"hour\" WHERE {Where(source)} AND {Between(from, to)}",
            (_, _, rows) => TakeHours(rows, hours), cancellationToken);
        return hours;
    }

    /// <summary>Readings of a source with the points of the hours, which are asked for first: a commit in between shows as a newer revision later.</summary>
    public async Task<SortedDictionary<long, (long Readings, long Change, long Sealed)>> ReadAsync(
        SourceKey source, IReadOnlyCollection<string>? channels, long from, long to, Action<string, JsonElement> onRows, CancellationToken cancellationToken)
    {
        SortedDictionary<long, (long, long, long)> hours = [];
        long firstHour = new Instant(from).StartOfHour().Microseconds;
        string which = channels is null ? string.Empty : $" AND ({string.Join(" OR ", channels.Select(one => $"\"channel\" = {Text(one)}"))})";
        await connection.QueryAsync(
            $"SELECT {HourFields} FROM \"hour\" WHERE {Where(source)} AND {Between(firstHour, to)}; " +
            $"SELECT \"v\",\"q\" FROM \"reading\" WHERE {Where(source)}{which} AND {Between(from, to)} GROUP BY \"channel\"",
            (statement, tags, rows) =>
            {
                if (statement == 0)
                {
                    TakeHours(rows, hours);
                }
                else
                {
                    onRows(tags.GetProperty("channel").GetString()!, rows);
                }
            },
            cancellationToken);
        return hours;
    }

    /// <summary>The newest reading of every channel of a source.</summary>
    public async Task<Dictionary<string, Reading>> NewestAsync(SourceKey source, CancellationToken cancellationToken)
    {
        Dictionary<string, Reading> newest = new(StringComparer.Ordinal);
        await connection.QueryAsync(
            $"SELECT \"v\",\"q\" FROM \"reading\" WHERE {Where(source)} GROUP BY \"channel\" ORDER BY time DESC LIMIT 1",
            (_, tags, rows) =>
            {
                string channel = tags.GetProperty("channel").GetString()!;
                newest[channel] = new Reading(channel, new Instant(rows[0][0].GetInt64()), Value(rows[0]), Quality(rows[0]));
            },
            cancellationToken);
        return newest;
    }

    /// <summary>Hours that changed after a number.</summary>
    public async Task<List<(SourceKey Source, long Hour)>> ChangedAsync(long after, CancellationToken cancellationToken)
    {
        List<(SourceKey, long)> hours = [];
        await connection.QueryAsync(
            string.Create(CultureInfo.InvariantCulture, $"SELECT \"change\" FROM \"hour\" WHERE \"change\" > {after} GROUP BY \"site\",\"source\""),
            (_, tags, rows) => hours.AddRange(rows.EnumerateArray().Select(row => (Key(tags), row[0].GetInt64()))),
            cancellationToken);
        return hours;
    }

    /// <summary>Sealings with numbers in a range, in rising order.</summary>
    public Task<List<SealedHour>> SealsAsync(long after, long last, CancellationToken cancellationToken) =>
        SealsAsync(string.Create(CultureInfo.InvariantCulture, $"\"number\" > {after} AND \"number\" <= {last}"), cancellationToken);

    /// <summary>Sealings of one hour, in rising order.</summary>
    public Task<List<SealedHour>> SealsAsync(SourceKey source, long hour, CancellationToken cancellationToken) =>
        SealsAsync($"{Where(source)} AND {Between(hour, hour + Instant.MicrosecondsPerHour)}", cancellationToken);

    /// <summary>Buckets of a channel, computed by the server. Empty ones are left out.</summary>
    public async Task<List<ReadingSummary>> ReduceAsync(ChannelKey channel, TimeWindow window, long bucket, CancellationToken cancellationToken)
    {
        List<ReadingSummary> summaries = [];
        await connection.QueryAsync(
            "SELECT count(\"v\"),first(\"v\"),last(\"v\"),min(\"v\"),max(\"v\"),mean(\"v\"),stddev(\"v\") FROM \"reading\" WHERE " +
            string.Create(CultureInfo.InvariantCulture, $"{Where(channel.Source)} AND \"channel\" = {Text(channel.Channel)} AND {Between(window.Start.Microseconds, window.End.Microseconds)} GROUP BY time({bucket}u) fill(none)"),
            (_, _, rows) => summaries.AddRange(rows.EnumerateArray().Where(row => row[1].ValueKind is JsonValueKind.Number && row[1].GetInt32() > 0).Select(Summary)),
            cancellationToken);
        return summaries;
    }

    /// <summary>Value of a row of time, value, quality.</summary>
    public static double Value(JsonElement row) => row[1].ValueKind is JsonValueKind.Number ? row[1].GetDouble() : double.NaN;

    /// <summary>Quality of a row of time, value, quality.</summary>
    public static ReadingQuality Quality(JsonElement row) => row[2].ValueKind is JsonValueKind.Number ? (ReadingQuality)row[2].GetByte() : ReadingQuality.None;

    private static ReadingSummary Summary(JsonElement row)
    {
        int count = row[1].GetInt32();
        double deviation = row[7].ValueKind is JsonValueKind.Number ? row[7].GetDouble() : 0;
        return new ReadingSummary(
            new Instant(row[0].GetInt64()), count, row[2].GetDouble(), row[3].GetDouble(), row[4].GetDouble(), row[5].GetDouble(), row[6].GetDouble(),
            deviation * deviation * (count - 1));
    }

    private static void TakeHours(JsonElement rows, SortedDictionary<long, (long, long, long)> hours)
    {
        foreach (JsonElement row in rows.EnumerateArray())
        {
            hours[row[0].GetInt64()] = (row[1].GetInt64(), row[2].GetInt64(), row[3].GetInt64());
        }
    }

    private async Task<List<SealedHour>> SealsAsync(string where, CancellationToken cancellationToken)
    {
        List<SealedHour> seals = [];
        await connection.QueryAsync(
            $"SELECT \"number\",\"hour\",\"part\",\"readings\",\"change\",\"sealed_at\",\"digest\" FROM \"seal\" WHERE {where} GROUP BY \"site\",\"source\"",
            (_, tags, rows) => seals.AddRange(rows.EnumerateArray().Select(row => new SealedHour(
                row[1].GetInt64(), Key(tags), new Instant(row[2].GetInt64()), row[3].GetInt32(), row[4].GetInt32(),
                Convert.FromHexString(row[7].GetString()!), new Instant(row[6].GetInt64()), row[5].GetInt64()))),
            cancellationToken);
        return [.. seals.OrderBy(one => one.Seal)];
    }

    private static SourceKey Key(JsonElement tags) => new(tags.GetProperty("site").GetString()!, tags.GetProperty("source").GetString()!);

    private static string Where(SourceKey source) => $"\"site\" = {Text(source.Site)} AND \"source\" = {Text(source.Source)}";

    private static string Between(long from, long to) => string.Create(
        CultureInfo.InvariantCulture, $"time >= {Math.Clamp(from, InfluxLines.FirstTime, InfluxLines.LastTime)}u AND time < {Math.Clamp(to, InfluxLines.FirstTime, InfluxLines.LastTime + 1)}u");

    private static string Text(string text) => "'" + text.Replace("\\", "\\\\", StringComparison.Ordinal).Replace("'", "\\'", StringComparison.Ordinal) + "'";
}
