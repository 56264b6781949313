using System.Globalization;
using Microsoft.Data.Sqlite;
using Microsoft.EntityFrameworkCore;
using Microsoft.EntityFrameworkCore.Infrastructure;
using Microsoft.EntityFrameworkCore.Migrations;
using Microsoft.Extensions.Logging;

namespace LabWatch.Records.Storage;

/// <summary>
/// Brings the database to this program's schema: forward only, with a copy of the SQLite file first. Refuses a database that a newer
/// program has written. A migration that is broken off leaves the schema as it was before that migration and is repeated at the next start.
/// </summary>
internal sealed class RecordsMigrator(RecordsContexts contexts, TimeProvider clock, ILogger<RecordsMigrator> logger)
{
    /// <summary>Prepares the database. Throws <see cref="RecordsVersionException"/> where it is newer than this program.</summary>
    public async Task MigrateAsync(CancellationToken cancellationToken)
    {
        using FileStream? alone = contexts.IsSqlite ? TakeMigrationLock() : null;
        await using RecordsContext context = contexts.Create();
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
