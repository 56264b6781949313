using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Readings.Engine;
using Microsoft.Data.Sqlite;
using Microsoft.Extensions.Logging.Abstractions;
using static LabWatch.Tests.Readings.StoreBench;

namespace LabWatch.Tests.Readings;

/// <summary>
/// A store that an earlier version wrote opens with everything in it. The databases in <c>Fixtures</c> were written by those versions: three
/// hours of two sources sealed, a late part, and five readings in the journal.
/// </summary>
public sealed class MigrationTests
{
    public static TheoryData<int> Versions { get; } = [.. Enumerable.Range(1, StoreDialect.SchemaVersion)];

    [Theory]
    [MemberData(nameof(Versions))]
    public async Task A_store_of_any_version_opens_with_all_its_readings(int version)
    {
        using TemporaryDirectory folder = new();
        Restore(version, folder.Path);
        await using (SqliteReadingStore store = Open(folder.Path))
        {
            await AssertWholeAsync(store);
            Assert.Equal(1, (await store.AppendAsync([Pack(Fir, Noon + TimeSpan.FromHours(5), 1)], Token)).Accepted);
            Assert.Equal(0, (await store.AppendAsync([Pack(Fir, Noon + TimeSpan.FromSeconds(3601), 7.5)], Token)).Accepted);
            await store.SealEverythingAsync(Token);
        }

        Assert.Equal(StoreDialect.SchemaVersion, Version(folder.Path));
        await using SqliteReadingStore again = Open(folder.Path);
        await AssertWholeAsync(again);
    }

    [Fact]
    public async Task A_store_of_a_newer_version_is_refused_and_left_alone()
    {
        using TemporaryDirectory folder = new();
        Restore(StoreDialect.SchemaVersion, folder.Path);
        Execute(folder.Path, $"PRAGMA user_version = {StoreDialect.SchemaVersion + 1}");
        await using SqliteReadingStore store = Open(folder.Path);
        StoreUnavailableException refused = await Assert.ThrowsAsync<StoreUnavailableException>(async () => await store.AppendAsync([Pack(Fir, Noon, 1)], Token));
        Assert.Contains("newer program", refused.Message, StringComparison.Ordinal);
        Assert.Equal(StoreDialect.SchemaVersion + 1, Version(folder.Path));
    }

    private static async Task AssertWholeAsync(SqliteReadingStore store)
    {
        TimeWindow window = new(Noon, Noon + TimeSpan.FromHours(4.5));
        ReadingWindow fir = await store.ReadAsync(Fir, null, window, Token);
        (Instant Time, double Value)[] expected = [.. Enumerable.Range(0, 3).SelectMany(hour => Enumerable.Range(0, 40).Select(i => (Noon + TimeSpan.FromSeconds((hour * 3600) + (i * 60)), Value(hour, i))))
            .Append((Noon + TimeSpan.FromSeconds(3601), 7.5))
            .Concat(Enumerable.Range(0, 5).Select(i => (Noon + TimeSpan.FromSeconds((4 * 3600) + i), 42.0 + i)))
            .OrderBy(one => one.Item1)];
        ReadingSeries t0 = fir.Find("t0")!;
        Assert.Equal(expected.Select(one => one.Time.Microseconds), t0.TimeMicroseconds.ToArray());
        Assert.Equal(expected.Select(one => BitConverter.DoubleToInt64Bits(one.Value)), t0.Values.ToArray().Select(BitConverter.DoubleToInt64Bits));
        Assert.Equal(120, fir.Find("t1")!.Count);
        Assert.Equal(60, (await store.ReadAsync(Yew, null, window, Token)).Series.Sum(one => one.Count));
        IReadOnlyList<ReadingSummary> hours = await store.ReduceAsync(new ChannelKey(Fir, "t1"), window, TimeSpan.FromHours(1), Token);
        Assert.Equal([(40, 0.0, 39.0), (40, 0, 39), (40, 0, 39)], hours.Select(row => (row.Count, row.Minimum, row.Maximum)));
        Assert.Empty(store.Findings);
    }

    private static double Value(int hour, int i) => i % 13 == 5 ? double.NaN : i % 17 == 3 ? Math.Sqrt(hour + i + 1) : Math.Round(100 + hour + (i / 100.0), 2);

    private static void Restore(int version, string folder)
    {
        foreach (string ending in (string[])["db", "mark"])
        {
            File.Copy(RepositoryFiles.PathOf("tests", "LabWatch.Tests", "Readings", "Fixtures", $"readings-v{version}.{ending}"), Path.Combine(folder, $"readings.{ending}"));
        }
    }

    private static SqliteReadingStore Open(string folder) =>
        new(new ReadingsOptions { DataDirectory = folder }, TimeProvider.System, NullLogger<SqliteReadingStore>.Instance);

    private static long Version(string folder) => Execute(folder, "PRAGMA user_version");

    private static long Execute(string folder, string sql)
    {
        using SqliteConnection connection = new($"Data Source={Path.Combine(folder, SqliteReadingStore.FileName)};Pooling=False");
        connection.Open();
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        return command.ExecuteScalar() is long number ? number : 0;
    }
}
