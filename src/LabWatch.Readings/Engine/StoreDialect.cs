using System.Data.Common;

namespace LabWatch.Readings.Engine;

/// <summary>
/// What differs between the databases that the engine runs on, and all SQL that it uses. Statements are in the common subset; times are
/// microseconds since 1970 UTC, ids are given out by the engine (there is one writer).
/// </summary>
internal abstract class StoreDialect
{
    /// <summary>Version of the tables that this program writes.</summary>
    public const int SchemaVersion = 2;

    public const string Sources = "SELECT id, site, source FROM source ORDER BY id";

    public const string Channels = "SELECT source_id, number, channel, newest_time, newest_bits, newest_quality FROM channel ORDER BY source_id, number";

    public const string AddSource = "INSERT INTO source(id, site, source) VALUES (@id, @site, @source)";

    public const string AddChannel = "INSERT INTO channel(source_id, number, channel) VALUES (@source, @number, @channel)";

    public const string SetNewest =
        "UPDATE channel SET newest_time = @time, newest_bits = @bits, newest_quality = @quality WHERE source_id = @source AND number = @number";

    public const string AppendJournal = "INSERT INTO journal(seq, data) VALUES (@seq, @data)";

    public const string JournalAfter = "SELECT seq, data FROM journal WHERE seq > @seq ORDER BY seq";

    public const string JournalNumbersAfter = "SELECT seq FROM journal WHERE seq > @seq ORDER BY seq";

    public const string JournalRow = "SELECT data FROM journal WHERE seq = @seq";

    public const string JournalBytes = "SELECT COALESCE(SUM(LENGTH(data)), 0) FROM journal";

    public const string DropJournal = "DELETE FROM journal WHERE seq <= @seq";

    public const string DropJournalRow = "DELETE FROM journal WHERE seq = @seq";

    public const string LastSealedChange = "SELECT COALESCE(MAX(last_change), 0) FROM block";

    public const string LastSeal = "SELECT COALESCE(MAX(id), 0) FROM block";

    public const string Floor = "SELECT value FROM state WHERE name = 'journal_floor'";

    public const string SetFloor = "UPDATE state SET value = @value WHERE name = 'journal_floor'";

    public const string HourState =
        "SELECT COALESCE(MAX(last_change), 0), COALESCE(MAX(part), -1) + 1 FROM block WHERE source_id = @source AND hour = @hour";

    public const string HourBlocks = "SELECT id FROM block WHERE source_id = @source AND hour = @hour ORDER BY part";

    public const string Block = "SELECT data FROM block WHERE id = @id";

    public const string HasPart = "SELECT COUNT(*) FROM block WHERE source_id = @source AND hour = @hour AND part = @part";

    public const string PartDigest = "SELECT digest FROM block WHERE source_id = @source AND hour = @hour AND part = @part";

    public const string AddBlock =
        "INSERT INTO block(id, source_id, hour, part, readings, last_change, sealed_at, digest, data) " +
        "VALUES (@id, @source, @hour, @part, @readings, @change, @at, @digest, @data)";

    public const string AddSummary = "INSERT INTO summary(block_id, data) VALUES (@id, @data)";

    public const string BlocksInWindow =
        "SELECT id, hour, part, readings, data FROM block WHERE source_id = @source AND hour >= @from AND hour < @to ORDER BY hour, part";

    public const string SummariesInWindow =
        "SELECT b.id, b.hour, b.part, s.data FROM block b LEFT JOIN summary s ON s.block_id = b.id " +
        "WHERE b.source_id = @source AND b.hour >= @from AND b.hour < @to ORDER BY b.hour, b.part";

    public const string HoursInWindow =
        "SELECT id, hour, part, readings FROM block WHERE source_id = @source AND hour >= @from AND hour < @to ORDER BY hour, part";

    public const string ChangedHours = "SELECT DISTINCT source_id, hour FROM block WHERE last_change > @change";

    public const string SealsAfter =
        "SELECT id, source_id, hour, part, readings, digest, sealed_at, last_change FROM block WHERE id > @id ORDER BY id LIMIT @count";

    /// <summary>Name of the state that says up to which block the rows of whole hours are made.</summary>
    public const string HourlyThrough = "hourly_through";

    public const string State = "SELECT value FROM state WHERE name = @name";

    public const string SetState = "UPDATE state SET value = @value WHERE name = @name";

    /// <summary>Writes and changes nothing.</summary>
    public const string Touch = "UPDATE state SET value = value WHERE name = 'hourly_through'";

    public const string BlocksAfter = "SELECT id, source_id, hour, part FROM block WHERE id > @id ORDER BY id LIMIT @count";

    public const string BlocksToCheck =
        "SELECT b.id, b.digest, t.digest, b.data FROM block b LEFT JOIN thinned t ON t.block_id = b.id WHERE b.id > @id ORDER BY b.id LIMIT @count";

    public const string OldBlocks =
        "SELECT b.id, b.source_id, b.hour, b.part, b.digest, b.data FROM block b WHERE b.hour < @before AND b.id > @id ORDER BY b.id LIMIT @count";

    public const string SetBlockData = "UPDATE block SET data = @data WHERE id = @id";

    public const string SetThinned =
        "INSERT INTO thinned(block_id, removed_at, digest) VALUES (@id, @at, @digest) " +
        "ON CONFLICT(block_id) DO UPDATE SET removed_at = excluded.removed_at, digest = excluded.digest";

    public const string ThinnedOfHour =
        "SELECT COUNT(*) FROM thinned t JOIN block b ON b.id = t.block_id WHERE b.source_id = @source AND b.hour = @hour";

    public const string Summary = "SELECT data FROM summary WHERE block_id = @id";

    public const string Hourly = "SELECT data FROM hourly WHERE source_id = @source AND channel = @channel AND day = @day";

    public const string HourlyInWindow =
        "SELECT day, data FROM hourly WHERE source_id = @source AND channel = @channel AND day >= @from AND day < @to ORDER BY day";

    public const string SetHourly =
        "INSERT INTO hourly(source_id, channel, day, data) VALUES (@source, @channel, @day, @data) " +
        "ON CONFLICT(source_id, channel, day) DO UPDATE SET data = excluded.data";

    public const string SetAside = "INSERT INTO set_aside(id, kind, reference, reason, found_at, data) VALUES (@id, @kind, @reference, @reason, @at, @data)";

    public const string LastSetAside = "SELECT COALESCE(MAX(id), 0) FROM set_aside";

    public const string AllSetAside = "SELECT id, kind, reference, reason FROM set_aside ORDER BY id";

    /// <summary>Where the database is, for messages.</summary>
    public abstract string Location { get; }

    /// <summary>Opens the only connection that writes, and makes or checks the tables.</summary>
    public abstract DbConnection OpenWriter();

    /// <summary>Opens a connection that reads.</summary>
    public abstract DbConnection OpenReader();

    /// <summary>Whether an error of the database says that what it stores is damaged (otherwise it is taken as unavailable).</summary>
    public abstract bool SaysDamaged(DbException error);

    /// <summary>
    /// Gives a bounded piece of the space that dropped rows left behind back to the disk; true while there is more of it than is worth
    /// keeping for new rows. Called between commits, so it takes a few milliseconds at most.
    /// </summary>
    public abstract bool ReleaseSpace(StoreConnection connection);

    /// <summary>Moves a database that cannot be opened at all out of the way, so that a new one can take readings; gives where it went.</summary>
    public abstract string SetWholeAside(string stamp);

    /// <summary>Whether a connection that lay idle still works. A file does not go away.</summary>
    public virtual bool Answers(StoreConnection connection) => true;

    /// <summary>Ends what the dialect holds apart from its connections.</summary>
    public virtual void Close()
    {
    }
}
