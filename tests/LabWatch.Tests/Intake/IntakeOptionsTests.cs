using LabWatch.Intake;
using LabWatch.Intake.Options;
using LabWatch.Intake.Payloads;
using LabWatch.Lab.Secrets;
using Microsoft.Extensions.DependencyInjection;

namespace LabWatch.Tests.Intake;

public class IntakeOptionsTests
{
    private static IntakeOptions Good { get; } = new()
    {
        InstallationId = "bench-1",
        SpoolDirectory = Path.GetTempPath(),
        EmbeddedBroker = new EmbeddedBrokerOptions(),
    };

    [Fact]
    public void Defaults_are_valid()
    {
        Assert.Empty(Good.Validate());
        Assert.Empty((Good with { ExternalBroker = new ExternalBrokerOptions { Host = "broker.example" } }).Validate());
    }

    [Fact]
    public void All_findings_come_at_once()
    {
        IntakeOptions bad = new()
        {
            Root = "lab/#",
            InstallationId = string.Empty,
            SpoolDirectory = "spool",
            SecretsDirectory = "secrets",
            QueueLimit = 0,
            SpoolLimitBytes = 5,
            Payload = new PayloadLimits { MaximumDepth = 1 },
            Times = new ReadingTimeRule { PermittedSkew = TimeSpan.FromMinutes(5), FutureLimit = TimeSpan.FromMinutes(1) },
            EmbeddedBroker = new EmbeddedBrokerOptions { Address = "nowhere", Port = 70_000 },
            ExternalBroker = new ExternalBrokerOptions { Host = "mqtt://x", Port = 0, PasswordSecret = "The Password", KeepAlive = TimeSpan.Zero },
        };
        Assert.Equal(
            [
                "EmbeddedBroker.Address", "EmbeddedBroker.Port", "ExternalBroker.Host", "ExternalBroker.KeepAlive", "ExternalBroker.PasswordSecret",
                "ExternalBroker.PasswordSecret", "ExternalBroker.Port", "ExternalBroker.Tls", "InstallationId", "Payload.MaximumDepth", "QueueLimit", "Root", "SecretsDirectory",
                "SpoolDirectory", "SpoolLimitBytes", "Times.FutureLimit",
            ],
            bad.Validate().Select(finding => finding.Where).Order(StringComparer.Ordinal));
    }

    [Fact]
    public void No_broker_is_a_finding() => Assert.Single((Good with { EmbeddedBroker = null }).Validate());

    [Fact]
    public void Registration_refuses_options_with_findings_and_is_idempotent()
    {
        var services = new ServiceCollection();
        Assert.Throws<ArgumentException>(() => services.AddLabWatchIntake(Good with { EmbeddedBroker = null }));
        Assert.Empty(services);
        services.AddLabWatchIntake(Good);
        int count = services.Count;
        services.AddLabWatchIntake(Good);
        Assert.Equal(count, services.Count);
    }

    [Fact]
    public void Secrets_come_from_the_folder_then_the_credentials_then_the_environment()
    {
        using var folder = new TemporaryDirectory();
        using var credentials = new TemporaryDirectory();
        var variables = new Dictionary<string, string> { ["CREDENTIALS_DIRECTORY"] = credentials.Path, ["LABWATCH_SECRET_BROKER_PASSWORD"] = "three" };
        var reader = new NamedSecrets(folder.Path, variables.GetValueOrDefault);
        Assert.Equal("three", reader.Read("broker-password"));
        File.WriteAllText(Path.Combine(credentials.Path, "broker-password"), "two\r\n");
        Assert.Equal("two", reader.Read("broker-password"));
        File.WriteAllText(Path.Combine(folder.Path, "broker-password"), "one\n");
        Assert.Equal("one", reader.Read("broker-password"));
        Assert.Null(reader.Read("other"));
        Assert.Null(reader.Read("../broker-password"));
    }
}
