using LabWatch.Alerts;
using LabWatch.Alerts.Links;
using LabWatch.Alerts.Push;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Api.Fakes;

/// <summary>Notifiers, devices and links in memory.</summary>
internal sealed class FakeNotifying(TimeProvider clock) : ITestMessages, IPushDesk, IAlertLinks
{
    private readonly List<PushSubscription> _devices = [];

    public List<string> Tested { get; } = [];

    public Dictionary<string, Guid> Links { get; } = [];

    public IReadOnlyList<Notifier> Notifiers { get; } =
        [new("log", NotifierKind.Log, null, null), new("duty", NotifierKind.Mail, new Uri("mailto:duty@hollin-vale.example"), null)];

    public string PublicKey => "BKey";

    public ValueTask<TestOutcome?> SendAsync(string notifier, string by, CancellationToken cancellationToken)
    {
        Tested.Add($"{notifier} by {by}");
        return ValueTask.FromResult<TestOutcome?>(new TestOutcome(false, "No answer within 10 s."));
    }

    public IReadOnlyList<PushSubscription> DevicesOf(string account) => [.. _devices.Where(device => device.Account == account)];

    public string? AccountOf(string notifier) => _devices.FirstOrDefault(device => "push-" + device.Id == notifier)?.Account;

    public (PushSubscription? Made, IReadOnlyList<Finding> Findings) Add(string account, string device, string endpoint, string publicKey, string secret)
    {
        if (!endpoint.StartsWith("https:", StringComparison.Ordinal))
        {
            return (null, [new Finding("bad-endpoint", "/endpoint", "No.", null, "Yes.")]);
        }

        PushSubscription made = new($"d{_devices.Count + 1}", account, device, new Uri(endpoint), publicKey, secret, Instant.Now(clock));
        _devices.Add(made);
        return (made, []);
    }

    public bool Remove(string account, string id) => _devices.RemoveAll(device => device.Account == account && device.Id == id) > 0;

    public Guid? Read(string token, Instant now) => Links.TryGetValue(token, out Guid alert) ? alert : null;
}
