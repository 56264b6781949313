using Microsoft.EntityFrameworkCore;
using Microsoft.EntityFrameworkCore.Design;

namespace LabWatch.Records.Storage;

/// <summary>Lets <c>dotnet ef</c> generate the PostgreSQL migrations without a server.</summary>
internal sealed class PostgreSqlDesignTimeFactory : IDesignTimeDbContextFactory<PostgreSqlRecordsContext>
{
    public PostgreSqlRecordsContext CreateDbContext(string[] args) =>
        new(new DbContextOptionsBuilder<PostgreSqlRecordsContext>().UseNpgsql("Host=localhost").Options);
}
