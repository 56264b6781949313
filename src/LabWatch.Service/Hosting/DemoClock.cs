using LabWatch.Lab.Time;

namespace LabWatch.Service.Hosting;

/// <summary>
/// The clock of a demo. A demo that ran faster than real time is ahead of the wall clock; its time never goes back at a later start, or
/// its readings would repeat hours that are over.
/// </summary>
internal static class DemoClock
{
    /// <summary>A clock of a speed that goes on from where the demo's time was, or from now where that is later.</summary>
    public static TimeProvider Resume(string dataDirectory, double speed, TimeProvider system)
    {
        DateTimeOffset now = system.GetUtcNow();
        DateTimeOffset kept = Instant.TryParse(Kept(dataDirectory), out Instant instant) ? instant.ToDateTimeOffset() : now;
        return speed == 1 && kept <= now ? system : new ScaledTimeProvider(system, speed, kept > now ? kept : now);
    }

    /// <summary>Keeps the time that the demo has reached.</summary>
    public static void Keep(string dataDirectory, TimeProvider clock)
    {
        string path = PathIn(dataDirectory);
        Directory.CreateDirectory(Path.GetDirectoryName(path)!);
        File.WriteAllText(path + ".new", Instant.Now(clock).ToString());
        File.Move(path + ".new", path, overwrite: true);
    }

    private static string? Kept(string dataDirectory) => File.Exists(PathIn(dataDirectory)) ? File.ReadAllText(PathIn(dataDirectory)).Trim() : null;

    private static string PathIn(string dataDirectory) => Path.Combine(dataDirectory, "demo", "time");
}
