using Microsoft.EntityFrameworkCore;
using Microsoft.EntityFrameworkCore.Design;

namespace LabWatch.Records.Storage;

/// <summary>Lets <c>dotnet ef</c> generate the SQLite migrations without a database.</summary>
internal sealed class SqliteDesignTimeFactory : IDesignTimeDbContextFactory<SqliteRecordsContext>
{
    public SqliteRecordsContext CreateDbContext(string[] args) =>
        new(new DbContextOptionsBuilder<SqliteRecordsContext>().UseSqlite("Data Source=:memory:").Options);
}
