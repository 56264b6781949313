using LabWatch.Intake.Options;
using LabWatch.Intake.Payloads.Mapped;

namespace LabWatch.Intake.Brokers.External;

/// <summary>The names under which the broker knows this installation.</summary>
/// <param name="ClientId">Client id of the persistent session.</param>
/// <param name="WatchClientId">Client id of the session that only watches. Another one, as a clean start would delete the persistent session.</param>
/// <param name="TopicFilters">What is subscribed to.</param>
internal sealed record BrokerIdentity(string ClientId, string WatchClientId, IReadOnlyList<string> TopicFilters)
{
    private const string Role = "labwatch-intake";

    public static BrokerIdentity Of(IntakeOptions options) =>
        new($"{Role}-{options.InstallationId}", $"{Role}-{options.InstallationId}-watch", [$"{options.Root}/#", .. new MappingTable(options.Mappings).Filters]);
}
