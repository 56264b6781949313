namespace LabWatch.SystemTests.Readings;

/// <summary>The tests that share one InfluxDB server.</summary>
[CollectionDefinition(Name)]
public sealed class InfluxCollection : ICollectionFixture<InfluxServer>
{
    public const string Name = "InfluxDB";
}
