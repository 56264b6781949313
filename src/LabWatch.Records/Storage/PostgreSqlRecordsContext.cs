using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Storage;

/// <summary>The records on a PostgreSQL server.</summary>
internal sealed class PostgreSqlRecordsContext(DbContextOptions<PostgreSqlRecordsContext> options) : RecordsContext(options);
