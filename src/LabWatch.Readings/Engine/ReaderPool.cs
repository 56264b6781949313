using System.Collections.Concurrent;

namespace LabWatch.Readings.Engine;

/// <summary>Connections that read, kept for the next reader.</summary>
internal sealed class ReaderPool(StoreDialect dialect) : IDisposable
{
    private const int IdleKept = 4;

    private readonly ConcurrentBag<StoreConnection> _idle = [];
    private volatile bool _closed;

    /// <summary>Runs a read on a connection of its own; a connection that failed is not used again.</summary>
    public T Use<T>(Func<StoreConnection, T> read)
    {
        ObjectDisposedException.ThrowIf(_closed, this);
        StoreConnection connection = Idle() ?? new StoreConnection(dialect.OpenReader());
        try
        {
            T result = read(connection);
            if (_idle.Count < IdleKept)
            {
                _idle.Add(connection);
                connection = null!;
            }

            return result;
        }
        finally
        {
            connection?.Dispose();
            if (_closed)
            {
                Clear();
            }
        }
    }

    public void Dispose()
    {
        _closed = true;
        Clear();
    }

    private StoreConnection? Idle()
    {
        while (_idle.TryTake(out StoreConnection? known))
        {
            if (dialect.Answers(known))
            {
                return known;
            }

            known.Dispose();
        }

        return null;
    }

    private void Clear()
    {
        while (_idle.TryTake(out StoreConnection? connection))
        {
            connection.Dispose();
        }
    }
}
