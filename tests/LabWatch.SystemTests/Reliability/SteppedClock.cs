using System.Globalization;

namespace LabWatch.SystemTests.Reliability;

/// <summary>
/// A wall clock of its own for a process under test, which can be stepped while it runs; its monotonic clock stays that of the machine, as
/// when an administrator or a time server sets a clock. By the preload library libfaketime.
/// </summary>
internal sealed class SteppedClock(string file)
{
    private static readonly string? Library = !OperatingSystem.IsLinux() || !Directory.Exists("/usr/lib")
        ? null
        : Directory.GetDirectories("/usr/lib").Select(folder => Path.Combine(folder, "faketime", "libfaketime.so.1")).FirstOrDefault(File.Exists);

    /// <summary>Gives a process its clock, or skips the test.</summary>
    public static SteppedClock ForOrSkip(string file, IDictionary<string, string> environment)
    {
        Assert.SkipWhen(Library is null, "libfaketime is not installed.");
        SteppedClock clock = new(file);
        clock.Set(TimeSpan.Zero);
        environment["LD_PRELOAD"] = Library!;
        environment["FAKETIME_TIMESTAMP_FILE"] = file;
        environment["FAKETIME_CACHE_DURATION"] = "1";
        environment["FAKETIME_DONT_FAKE_MONOTONIC"] = "1";
        environment["DONT_FAKE_MONOTONIC"] = "1";
        return clock;
    }

    /// <summary>Steps the clock to an offset from the machine's.</summary>
    public void Set(TimeSpan offset)
    {
        File.WriteAllText(file + ".next", string.Create(CultureInfo.InvariantCulture, $"{(offset < TimeSpan.Zero ? string.Empty : "+")}{(long)offset.TotalSeconds}\n"));
        File.Move(file + ".next", file, overwrite: true);
    }
}
