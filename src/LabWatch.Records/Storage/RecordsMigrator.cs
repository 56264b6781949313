using System.Globalization;
using Microsoft.Data.Sqlite;
using Microsoft.EntityFrameworkCore;
using Microsoft.EntityFrameworkCore.Infrastructure;
using Microsoft.EntityFrameworkCore.Migrations;
using Microsoft.EntityFrameworkCore.Storage;
using Microsoft.Extensions.Logging;
using Npgsql;

namespace LabWatch.Records.Storage;

/// <summary>
/// Brings the database to this program's schema: forward only, with a copy of the SQLite file first. Refuses a database that a newer
/// program has written. A migration that is broken off leaves the schema as it was before that migration and is repeated at the next start.
/// </summary>
internal sealed class RecordsMigrator(RecordsContexts contexts, TimeProvider clock, ILogger<RecordsMigrator> logger)
{
    /// <summary>Key of the PostgreSQL advisory lock of migrations ("LabWatcM" in ASCII).</summary>
    private const long MigrationKey = 0x4C61_6257_6174_634D;

    /// <summary>Prepares the database. Throws <see cref="RecordsVersionException"/> where it is newer than this program.</summary>
    public async Task MigrateAsync(CancellationToken cancellationToken)
    {
        using FileStream? alone = contexts.IsSqlite ? TakeMigrationLock() : null;
        await using RecordsContext context = contexts.Create();
        if (contexts.IsSqlite)
        {
            await MigrateAsync(context, cancellationToken);
            return;
        }

        await TakeTurnAsync(context, cancellationToken);
        try
        {
            await MigrateAsync(context, cancellationToken);
        }
        finally
        {
            // The pool keeps the connection open, and a lock of its session with it.
            await context.Database.ExecuteSqlAsync($"SELECT pg_advisory_unlock({MigrationKey})", CancellationToken.None);
        }
    }

    private async Task MigrateAsync(RecordsContext context, CancellationToken cancellationToken)
    {
        IHistoryRepository history = context.GetService<IHistoryRepository>();
        IMigrationsAssembly known = context.GetService<IMigrationsAssembly>();
        bool exists = await history.ExistsAsync(cancellationToken);
        IReadOnlyList<string> applied = exists
            ? [.. (await history.GetAppliedMigrationsAsync(cancellationToken)).Select(row => row.MigrationId).Order(StringComparer.Ordinal)]
            : [];
        RefuseNewer(applied, known);
        List<string> pending = [.. known.Migrations.Keys.Except(applied, StringComparer.Ordinal)];
        if (pending.Count > 0)
        {
            if (contexts.IsSqlite)
            {
                await PrepareFileAsync(context, exists, applied.Count > 0 ? applied[^1] : "none", cancellationToken);
            }

            await context.Database.MigrateAsync(cancellationToken);
            RecordsLog.Migrated(logger, pending.Count, pending[^1]);
        }
    }

    private async Task PrepareFileAsync(RecordsContext context, bool exists, string schema, CancellationToken cancellationToken)
    {
        await UseWriteAheadLogAsync(context, cancellationToken);
        await ForgetBrokenOffMigrationAsync(context, cancellationToken);
        if (exists)
        {
            await CopyAsync(schema, cancellationToken);
        }
    }

    private void RefuseNewer(IReadOnlyList<string> applied, IMigrationsAssembly known)
    {
        string? unknown = applied.FirstOrDefault(id => !known.Migrations.ContainsKey(id));
        if (unknown is not null)
        {
            throw new RecordsVersionException(
                $"The records in {(contexts.IsSqlite ? contexts.Options.FilePath : "the PostgreSQL database")} were written by a newer version of LabWatch "
                + $"(schema {unknown}; this version knows up to {known.Migrations.Keys.LastOrDefault()}). Nothing was changed. Install the newer version again, "
                + "or restore the backup that was made before the upgrade.");
        }
    }

    /// <summary>
    /// Nodes that start together migrate one after the other: the lock is the session's, taken before anybody looks which migrations are
    /// missing, and ends with the connection, so that a killed node holds nothing up.
    /// </summary>
    private static async Task TakeTurnAsync(RecordsContext context, CancellationToken cancellationToken)
    {
        IRelationalDatabaseCreator creator = context.GetService<IRelationalDatabaseCreator>();
        if (!await creator.ExistsAsync(cancellationToken))
        {
            try
            {
                await creator.CreateAsync(cancellationToken);
            }
            catch (PostgresException exception) when (exception.SqlState is PostgresErrorCodes.DuplicateDatabase or PostgresErrorCodes.UniqueViolation)
            {
                // Another node was quicker.
            }
        }

        await context.Database.OpenConnectionAsync(cancellationToken);
        await context.Database.ExecuteSqlAsync($"SELECT pg_advisory_lock({MigrationKey})", cancellationToken);
    }

    private FileStream TakeMigrationLock()
    {
        Directory.CreateDirectory(contexts.Options.DataDirectory);
        return new FileStream(
            contexts.Options.FilePath + ".migrating", FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.None, 1, FileOptions.DeleteOnClose);
    }

    private static Task<int> UseWriteAheadLogAsync(RecordsContext context, CancellationToken cancellationToken) =>
        context.Database.ExecuteSqlRawAsync("PRAGMA journal_mode = WAL;", cancellationToken);

    /// <summary>The ORM's lock table is left behind by a killed process and would block for ever; the lock file above is the true lock.</summary>
    private static async Task ForgetBrokenOffMigrationAsync(RecordsContext context, CancellationToken cancellationToken) =>
        await context.Database.ExecuteSqlRawAsync("DROP TABLE IF EXISTS \"__EFMigrationsLock\";", cancellationToken);

    private async Task CopyAsync(string schema, CancellationToken cancellationToken)
    {
        string stamp = clock.GetUtcNow().ToString("yyyyMMdd'T'HHmmss'Z'", CultureInfo.InvariantCulture);
        string target = Path.Combine(contexts.Options.DataDirectory, $"records.before-upgrade-{stamp}.db");
        string partial = target + ".part";
        File.Delete(partial);
        await using (SqliteConnection connection = new(RecordsContexts.SqliteConnection(contexts.Options)))
        {
            await connection.OpenAsync(cancellationToken);
            await using SqliteCommand copy = connection.CreateCommand();
            copy.CommandText = "VACUUM INTO $target;";
            copy.Parameters.AddWithValue("$target", partial);
            await copy.ExecuteNonQueryAsync(cancellationToken);
        }

        File.Move(partial, target, overwrite: true);
        RecordsLog.Copied(logger, schema, target);
    }
}
