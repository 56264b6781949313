using LabWatch.Readings.Engine;
using LabWatch.Readings.Engine.PostgreSql;
using LabWatch.Readings.Quarantine;
using Microsoft.Extensions.Logging;

namespace LabWatch.Readings;

/// <summary>Makes the engine of sealed source-hours on PostgreSQL, and its quarantine. Nothing is opened yet.</summary>
internal static class PostgreSqlReadingStore
{
    public static BlockReadingStore Create(ReadingsOptions options, TimeProvider clock, ILogger log)
    {
        PostgreSqlTarget target = Target(options);
        return new BlockReadingStore(
            new PostgreSqlDialect(target), Path.Combine(Path.GetFullPath(options.DataDirectory), target.MarkName), options, clock, log);
    }

    public static PostgreSqlDialect Dialect(ReadingsOptions options) => new(Target(options));

    public static PostgreSqlQuarantine Quarantine(ReadingsOptions options) => new(Target(options), options);

    private static PostgreSqlTarget Target(ReadingsOptions options)
    {
        ReadingsSecrets secrets = new(options.SecretsDirectory);
        return new PostgreSqlTarget(options.PostgreSql, () => secrets.Read(options.PostgreSql.PasswordSecret));
    }
}
