using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Storage;

/// <summary>The records in an SQLite file.</summary>
internal sealed class SqliteRecordsContext(DbContextOptions<SqliteRecordsContext> options) : RecordsContext(options);
