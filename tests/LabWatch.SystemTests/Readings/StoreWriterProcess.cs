using System.Diagnostics;
using System.Globalization;
using System.Runtime.CompilerServices;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.SystemTests.Readings;

/// <summary>
/// A process of its own that appends to a store, seals beside it, and says each commit on its output once it is durable. It is this very
/// test program, started with the variables below.
/// </summary>
internal static class StoreWriterProcess
{
    public const int PackWidth = 12;

    private const string FolderVariable = "LABWATCH_TEST_STORE_FOLDER";
    private const string FromVariable = "LABWATCH_TEST_STORE_FROM";

    public static SourceKey Source { get; } = new("hollin-vale", "fir");

    public static Instant Start { get; } = Instant.FromUnixSeconds(1_700_000_000);

    public static SqliteReadingStore Open(string folder) => new(
        new ReadingsOptions { DataDirectory = folder, QuietPeriod = TimeSpan.FromSeconds(1), JournalBytesLimit = 1 << 20 },
        TimeProvider.System,
        NullLogger<SqliteReadingStore>.Instance);

    /// <summary>The pack of a number: one minute after the pack before.</summary>
    public static ReadingPack Pack(int number)
    {
        Instant time = Start + TimeSpan.FromMinutes(number);
        return new ReadingPack(Source, time, [.. Enumerable.Range(0, PackWidth).Select(i => new Reading($"t{i}", time, number + (i / 100.0)))]);
    }

    public static Process StartChild(string folder, int from)
    {
        string program = Environment.ProcessPath!;
        ProcessStartInfo start = new(program) { RedirectStandardOutput = true, UseShellExecute = false };
        if (Path.GetFileNameWithoutExtension(program) == "dotnet")
        {
            start.ArgumentList.Add(typeof(StoreWriterProcess).Assembly.Location);
        }

        start.Environment[FolderVariable] = folder;
        start.Environment[FromVariable] = from.ToString(CultureInfo.InvariantCulture);
        return Process.Start(start)!;
    }

    /// <summary>
    /// Turns this process into a writer where the variables ask for it; it ends only when it is killed. All on the one thread: others that
    /// need this module wait until its initializer is done.
    /// </summary>
    [ModuleInitializer]
    internal static void WriteWhereAsked()
    {
        if (Environment.GetEnvironmentVariable(FolderVariable) is { } folder)
        {
            Write(folder, int.Parse(Environment.GetEnvironmentVariable(FromVariable)!, CultureInfo.InvariantCulture));
        }
    }

    private static void Write(string folder, int from)
    {
        SqliteReadingStore store = Open(folder);
        Task<int> sealing = Task.FromResult(0);
        for (int number = from; ; number++)
        {
            store.AppendAsync([Pack(number)], CancellationToken.None).AsTask().GetAwaiter().GetResult();
            Console.Out.WriteLine(number.ToString(CultureInfo.InvariantCulture));
            if (number % 50 == 0 && sealing.IsCompleted)
            {
                sealing.GetAwaiter().GetResult();
                sealing = number % 500 == 0 ? store.SealEverythingAsync(CancellationToken.None) : store.SealDueAsync(CancellationToken.None);
            }
        }
    }
}
