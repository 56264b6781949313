using LabWatch.Records.Storage;

namespace LabWatch.Records.Audit.Verification;

/// <summary>The records at one moment, opened for reading alone: beside a service that runs, or without one.</summary>
internal abstract class RecordsSnapshot(RecordsContext model) : IDisposable
{
    /// <summary>The model of the tables; it is never connected.</summary>
    public RecordsContext Model { get; } = model;

    /// <summary>Clause behind the name of a table that is read from end to end, so that no index decides what is seen.</summary>
    public abstract string WholeTable { get; }

    /// <summary>Name of the number that rows are stored by, for reading a damaged table from its other end; null where there is none.</summary>
    public abstract string? RowNumber { get; }

    /// <summary>Begins a query. The text is made by this program alone. Throws <see cref="UnreadableException"/> where it cannot begin.</summary>
    public abstract TableScan Scan(string sql);

    /// <summary>
    /// Reads a table from end to end. Where a page is damaged, what lies behind it is read from the other end; the reason is given then, null
    /// where all was read.
    /// </summary>
    /// <param name="columns">Columns, separated by commas.</param>
    /// <param name="table">Name of the table.</param>
    /// <param name="take">Takes each row.</param>
    public string? Walk(string columns, string table, Action<TableScan> take)
    {
        int number = columns.Count(letter => letter == ',') + 1;
        string sql = $"SELECT {columns}{(RowNumber is null ? string.Empty : ", " + RowNumber)} FROM \"{table}\"{WholeTable}";
        long last = long.MinValue;
        bool isInOrder = true;
        try
        {
            using TableScan scan = Scan(sql);
            while (scan.Read())
            {
                long row = RowNumber is null ? 0 : scan.Whole(number);
                isInOrder &= RowNumber is null || row > last;
                last = row;
                take(scan);
            }

            return isInOrder ? null : "its rows do not lie in the order of their numbers, so that a search can miss one";
        }
        catch (UnreadableException exception)
        {
            WalkBack($"{sql} ORDER BY {RowNumber} DESC", number, last, take);
            return exception.Message;
        }
    }

    private void WalkBack(string sql, int number, long last, Action<TableScan> take)
    {
        if (RowNumber is null)
        {
            return;
        }

        try
        {
            using TableScan scan = Scan(sql);
            while (scan.Read() && scan.Whole(number) > last)
            {
                take(scan);
            }
        }
        catch (UnreadableException)
        {
            // The damaged place was met from this side too: the rows on it are those that entries will miss.
        }
    }

    /// <summary>Opens the records of the options. Throws <see cref="UnreadableException"/> where they cannot be opened.</summary>
    /// <param name="options">Where they are.</param>
    /// <param name="inUse">Whether a process is known to use them.</param>
    public static RecordsSnapshot Open(RecordsOptions options, bool inUse) => options.Provider is RecordsProvider.Sqlite
        ? SqliteSnapshot.Open(options, inUse)
        : PostgreSqlSnapshot.Open(options);

    /// <inheritdoc/>
    public virtual void Dispose() => Model.Dispose();
}
