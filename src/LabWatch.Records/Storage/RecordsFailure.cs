using System.Data.Common;
using System.Net.Sockets;
using Microsoft.Data.Sqlite;
using Npgsql;

namespace LabWatch.Records.Storage;

/// <summary>Tells failures of the moment from defects.</summary>
internal static class RecordsFailure
{
    private const int SqliteError = 1;
    private const int SqliteConstraint = 19;
    private const int SqliteMismatch = 20;
    private const int SqliteMisuse = 21;
    private const int SqliteRange = 25;

    /// <summary>
    /// Whether the same call may succeed later. Constraint violations and faulty statements are defects; all else that a database
    /// reports (locked, disk full, unreadable, server gone) is of the moment.
    /// </summary>
    public static bool IsOfTheMoment(Exception exception) => exception switch
    {
        SqliteException sqlite => sqlite.SqliteErrorCode is not (SqliteError or SqliteConstraint or SqliteMismatch or SqliteMisuse or SqliteRange),
        PostgresException postgres => postgres.SqlState[..2] is not ("22" or "23" or "42"),
        DbException or SocketException or TimeoutException => true,
        UnauthorizedAccessException or RecordsUnavailableException => false,
        IOException => true,
        { InnerException: { } inner } => IsOfTheMoment(inner),
        _ => false,
    };

    /// <summary>The exception that callers catch, with what happened in words.</summary>
    public static RecordsUnavailableException Unavailable(Exception cause) =>
        new($"The records database cannot answer now ({cause.GetBaseException().Message}). The call may be repeated.", cause);
}
