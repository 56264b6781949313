using LabWatch.Readings.Engine.PostgreSql;

namespace LabWatch.Readings.Quarantine;

/// <summary>Refused messages in the schema of the readings in PostgreSQL, on a connection of their own.</summary>
internal sealed class PostgreSqlQuarantine(PostgreSqlTarget target, ReadingsOptions options)
    : TableQuarantine(new PostgreSqlQuarantineTable(target, options.QuarantineCountLimit, options.QuarantineBytesLimit));
