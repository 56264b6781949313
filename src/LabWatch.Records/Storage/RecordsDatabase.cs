using LabWatch.Records.Audit;
using Microsoft.EntityFrameworkCore;
using Microsoft.EntityFrameworkCore.Storage;

namespace LabWatch.Records.Storage;

/// <summary>
/// The one way to the records: prepared at first use, many readers, one writer at a time. Every failure of the moment comes out as
/// <see cref="RecordsUnavailableException"/>.
/// </summary>
internal sealed class RecordsDatabase(RecordsContexts contexts, RecordsMigrator migrator, TrailBeginning beginning, TrailHeads heads) : IDisposable
{
    /// <summary>Key of the PostgreSQL advisory lock that makes writers take turns ("LabWatch" in ASCII).</summary>
    private const long WriterKey = 0x4C61_6257_6174_6368;

    private readonly SemaphoreSlim _writer = new(1, 1);
    private readonly SemaphoreSlim _preparing = new(1, 1);
    private volatile bool _ready;

    /// <summary>Migrates the database where that has not been done yet. Called by the others; earlier where a start-up wants to know.</summary>
    public async ValueTask PrepareAsync(CancellationToken cancellationToken)
    {
        if (_ready)
        {
            return;
        }

        await _preparing.WaitAsync(cancellationToken);
        try
        {
            if (!_ready)
            {
                await migrator.MigrateAsync(cancellationToken);
                await CommitAsync(context => BeginAsync(context, cancellationToken), cancellationToken);
                _ready = true;
            }
        }
        catch (Exception exception) when (RecordsFailure.IsOfTheMoment(exception))
        {
            throw RecordsFailure.Unavailable(exception);
        }
        finally
        {
            _preparing.Release();
        }
    }

    /// <summary>Reads.</summary>
    public async ValueTask<T> ReadAsync<T>(Func<RecordsContext, Task<T>> read, CancellationToken cancellationToken)
    {
        await PrepareAsync(cancellationToken);
        try
        {
            await using RecordsContext context = contexts.Create();
            context.ChangeTracker.QueryTrackingBehavior = QueryTrackingBehavior.NoTracking;
            return await read(context);
        }
        catch (Exception exception) when (RecordsFailure.IsOfTheMoment(exception))
        {
            throw RecordsFailure.Unavailable(exception);
        }
    }

    /// <summary>
    /// Writes in one transaction: all of what <paramref name="write"/> does, or nothing. Writers take turns over all processes, so that
    /// numbers given out inside are without gaps and become visible in their order. Whatever has to stand or fall with a change
    /// (queue number, message to a notifier, entry of a trail) is added here or in <paramref name="write"/>, never afterwards.
    /// </summary>
    public async ValueTask<T> WriteAsync<T>(Func<RecordsContext, Task<T>> write, CancellationToken cancellationToken)
    {
        await PrepareAsync(cancellationToken);
        await _writer.WaitAsync(cancellationToken);
        try
        {
            return await CommitAsync(write, cancellationToken);
        }
        catch (Exception exception) when (RecordsFailure.IsOfTheMoment(exception))
        {
            throw RecordsFailure.Unavailable(exception);
        }
        finally
        {
            _writer.Release();
        }
    }

    private async Task<T> CommitAsync<T>(Func<RecordsContext, Task<T>> write, CancellationToken cancellationToken)
    {
        await using RecordsContext context = contexts.Create();
        await using IDbContextTransaction transaction = await context.Database.BeginTransactionAsync(cancellationToken);
        if (!contexts.IsSqlite)
        {
            await context.Database.ExecuteSqlAsync($"SELECT pg_advisory_xact_lock({WriterKey})", cancellationToken);
        }

        T result = await write(context);
        await context.SaveChangesAsync(cancellationToken);
        await transaction.CommitAsync(cancellationToken);
        heads.Note(context.ChainHeads);
        return result;
    }

    private async Task<bool> BeginAsync(RecordsContext context, CancellationToken cancellationToken)
    {
        await beginning.RunAsync(context, cancellationToken);
        await heads.CompareAsync(context, cancellationToken);
        return true;
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        _writer.Dispose();
        _preparing.Dispose();
    }
}
