using System.Collections.Concurrent;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;
using LabWatch.Service.Api.Ports;
using LabWatch.Service.Api.Views;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>Readiness as a test says.</summary>
internal sealed class FakeReadiness : IReadinessPort
{
    public ConcurrentDictionary<SourceKey, ReadinessView> States { get; } = new();

    public ValueTask<ReadinessView> OfAsync(ReferenceSource source, CancellationToken cancellationToken) =>
        new(States.GetValueOrDefault(source.Key) ?? new ReadinessView("unknown", [new ReadinessReasonView("no-data", "There is no reading yet.")], null));
}
