using LabWatch.Readings.Journal;

namespace LabWatch.Readings.Influx;

/// <summary>
/// Keeps two programs from writing one database. On this machine a lock file holds; between machines a point says who writes and when it
/// last said so. The server cannot decide between two that ask in the same second, so this is a guard against mistakes, not a lease.
/// </summary>
internal sealed class InfluxWriterClaim : IDisposable
{
    private static readonly TimeSpan Renewal = TimeSpan.FromSeconds(5);
    private static readonly TimeSpan Life = TimeSpan.FromSeconds(30);

    private readonly InfluxConnection _connection;
    private readonly CommitMark _mark;
    private readonly string _owner;
    private long _renewed;

    private InfluxWriterClaim(InfluxConnection connection, CommitMark mark, string owner)
    {
        _connection = connection;
        _mark = mark;
        _owner = owner;
    }

    /// <summary>Last commit that this machine knows of.</summary>
    public long LastChange => _mark.Last;

    /// <summary>Takes the database. Throws <see cref="StoreUnavailableException"/> where somebody else has it.</summary>
    public static async Task<InfluxWriterClaim> TakeAsync(InfluxConnection connection, InfluxQueries queries, string markPath, CancellationToken cancellationToken)
    {
        CommitMark mark;
        string owner;
        try
        {
            Directory.CreateDirectory(Path.GetDirectoryName(markPath)!);
            mark = new CommitMark(markPath);
            owner = Owner(Path.ChangeExtension(markPath, ".owner"));
        }
        catch (Exception error) when (error is IOException or UnauthorizedAccessException)
        {
            throw new StoreUnavailableException($"The readings are in use by another process, or {markPath} cannot be written: {error.Message} Stop the other process or choose another data directory.", error);
        }

        InfluxWriterClaim claim = new(connection, mark, owner);
        try
        {
            if (await queries.WriterAsync(cancellationToken) is { } writer && writer.Owner != owner && Now() - writer.Seconds < Life.TotalSeconds)
            {
                throw new StoreUnavailableException($"{connection.Location} is written by another service. Stop it and wait {Life.TotalSeconds:F0} s, or choose another database.");
            }

            await claim.SayAsync(Now(), cancellationToken);
            return claim;
        }
        catch
        {
            mark.Dispose();
            throw;
        }
    }

    /// <summary>The line that renews the claim; null while that is not due.</summary>
    public string? Due()
    {
        if (_renewed != 0 && TimeProvider.System.GetElapsedTime(_renewed) < Renewal)
        {
            return null;
        }

        _renewed = TimeProvider.System.GetTimestamp();
        return InfluxLines.Writer(_owner, Now());
    }

    /// <summary>Notes the number of a durable commit.</summary>
    public void OnCommitted(long change) => _mark.Write(change);

    /// <summary>Says that nobody writes any more.</summary>
    public async Task LeaveAsync(CancellationToken cancellationToken) => await SayAsync(0, cancellationToken);

    public void Dispose() => _mark.Dispose();

    private static long Now() => TimeProvider.System.GetUtcNow().ToUnixTimeSeconds();

    private static string Owner(string path)
    {
        if (!File.Exists(path) || File.ReadAllText(path) is not { Length: 32 } known || !known.All(char.IsAsciiHexDigit))
        {
            File.WriteAllText(path, known = Guid.NewGuid().ToString("N"));
        }

        return known;
    }

    private async Task SayAsync(long seconds, CancellationToken cancellationToken) =>
        await _connection.WriteAsync([InfluxLines.Writer(_owner, seconds)], cancellationToken);
}
