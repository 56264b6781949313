namespace LabWatch.SystemTests.Records;

/// <summary>The tests that share one PostgreSQL server.</summary>
[CollectionDefinition(Name)]
public sealed class PostgreSqlCollection : ICollectionFixture<PostgreSqlServer>
{
    public const string Name = "PostgreSQL";
}
