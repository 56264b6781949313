using System.Globalization;
using Npgsql;

namespace LabWatch.Readings.Engine.PostgreSql;

/// <summary>The tables: the same as in the file, in types of PostgreSQL. Blobs are compressed already and are stored as they are.</summary>
internal static class PostgreSqlSchema
{
    private const string VersionOne =
        """
        CREATE TABLE state(name text PRIMARY KEY, value bigint NOT NULL);
        INSERT INTO state(name, value) VALUES ('journal_floor', 0), ('schema_version', 0);
        CREATE TABLE source(id bigint PRIMARY KEY, site text NOT NULL, source text NOT NULL, UNIQUE(site, source));
        CREATE TABLE channel(source_id bigint NOT NULL, number integer NOT NULL, channel text NOT NULL,
          newest_time bigint, newest_bits bigint, newest_quality integer,
          PRIMARY KEY(source_id, number), UNIQUE(source_id, channel));
        CREATE TABLE journal(seq bigint PRIMARY KEY, data bytea NOT NULL);
        CREATE TABLE block(id bigint PRIMARY KEY, source_id bigint NOT NULL, hour bigint NOT NULL, part integer NOT NULL,
          readings integer NOT NULL, last_change bigint NOT NULL, sealed_at bigint NOT NULL, digest bytea NOT NULL, data bytea NOT NULL);
        CREATE UNIQUE INDEX block_hour ON block(source_id, hour, part) INCLUDE (readings, last_change);
        CREATE INDEX block_change ON block(last_change, source_id, hour);
        CREATE TABLE summary(block_id bigint PRIMARY KEY, data bytea NOT NULL);
        CREATE TABLE set_aside(id bigint PRIMARY KEY, kind text NOT NULL, reference bigint NOT NULL, reason text NOT NULL,
          found_at bigint NOT NULL, data bytea);
        ALTER TABLE journal ALTER COLUMN data SET STORAGE EXTERNAL;
        ALTER TABLE block ALTER COLUMN data SET STORAGE EXTERNAL;
        ALTER TABLE summary ALTER COLUMN data SET STORAGE EXTERNAL;
        """;

    /// <summary>Rows of whole hours for charts of years, and what retention removed from sealed parts.</summary>
    private const string VersionTwo =
        """
        CREATE TABLE hourly(source_id bigint NOT NULL, channel integer NOT NULL, day bigint NOT NULL, data bytea NOT NULL,
          PRIMARY KEY(source_id, channel, day));
        CREATE TABLE thinned(block_id bigint PRIMARY KEY, removed_at bigint NOT NULL, digest bytea NOT NULL);
        INSERT INTO state(name, value) VALUES ('hourly_through', 0);
        ALTER TABLE hourly ALTER COLUMN data SET STORAGE EXTERNAL;
        """;

    /// <summary>What leads from each version to the next; older tables are brought up in one transaction.</summary>
    private static readonly string[] Steps = [VersionOne, VersionTwo];

    /// <summary>Makes or checks the tables; call with the lock held.</summary>
    public static void Migrate(NpgsqlConnection connection, string schema)
    {
        long found = Version(connection, schema);
        if (found > StoreDialect.SchemaVersion)
        {
            throw new StoreUnavailableException($"The readings are in version {found} of the format; this program knows {StoreDialect.SchemaVersion}. Run the newer program.");
        }

        if (found < StoreDialect.SchemaVersion)
        {
            using NpgsqlTransaction transaction = connection.BeginTransaction();
            Execute(connection, $"CREATE SCHEMA IF NOT EXISTS {schema}");
            foreach (string step in Steps.AsSpan((int)found))
            {
                Execute(connection, step);
            }

            Execute(connection, string.Create(CultureInfo.InvariantCulture, $"UPDATE state SET value = {StoreDialect.SchemaVersion} WHERE name = 'schema_version'"));
            transaction.Commit();
        }
    }

    public static void Execute(NpgsqlConnection connection, string sql)
    {
#pragma warning disable CA2100 // Constants, and the schema's name, which is validated to be a plain identifier.
        using NpgsqlCommand command = new(sql, connection);
#pragma warning restore CA2100
        command.ExecuteNonQuery();
    }

    private static long Version(NpgsqlConnection connection, string schema)
    {
        using NpgsqlCommand exists = new("SELECT to_regclass(@name) IS NOT NULL", connection);
        exists.Parameters.AddWithValue("name", $"{schema}.state");
        if (exists.ExecuteScalar() is not true)
        {
            return 0;
        }

        using NpgsqlCommand version = new("SELECT value FROM state WHERE name = 'schema_version'", connection);
        return (long)version.ExecuteScalar()!;
    }
}
