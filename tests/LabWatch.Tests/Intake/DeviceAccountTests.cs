using LabWatch.Intake.Accounts;
using LabWatch.Intake.Brokers.Embedded;
using LabWatch.Intake.Payloads.Mapped;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Intake;

/// <summary>Who may publish what at the embedded broker.</summary>
public sealed class DeviceAccountTests : IDisposable
{
    private static readonly Instant Now = Instant.FromUnixSeconds(1_796_112_930);
    private readonly TemporaryDirectory _directory = new();

    private string Path => System.IO.Path.Combine(_directory.Path, "devices.json");

    public void Dispose() => _directory.Dispose();

    [Fact]
    public void An_account_outlives_the_service_and_its_password_is_stored_nowhere()
    {
        string password = new DeviceAccountFile(Path).Add("fir-logger", IntakeLab.Fir, "ann", Now)!;
        Assert.DoesNotContain(password, File.ReadAllText(Path), StringComparison.Ordinal);
        DeviceAccountFile again = new(Path);
        Assert.Equal("hollin-vale.fir", again.Find("fir-logger", System.Text.Encoding.UTF8.GetBytes(password))!.Source);
        Assert.Null(again.Find("fir-logger", "wrong"u8));
        Assert.Null(again.Find("other", System.Text.Encoding.UTF8.GetBytes(password)));
        if (!OperatingSystem.IsWindows())
        {
            Assert.Equal(UnixFileMode.UserRead | UnixFileMode.UserWrite, File.GetUnixFileMode(Path));
        }
    }

    [Fact]
    public void An_account_that_is_taken_back_opens_nothing_and_its_name_is_not_given_again()
    {
        DeviceAccountFile accounts = new(Path);
        string password = accounts.Add("fir-logger", IntakeLab.Fir, "ann", Now)!;
        string? cutOff = null;
        accounts.Revoked += name => cutOff = name;
        Assert.True(accounts.Revoke("fir-logger", Now));
        Assert.False(accounts.Revoke("fir-logger", Now));
        Assert.Equal("fir-logger", cutOff);
        Assert.Null(accounts.Find("fir-logger", System.Text.Encoding.UTF8.GetBytes(password)));
        Assert.Null(accounts.Add("fir-logger", IntakeLab.Fir, "ann", Now));
        Assert.Equal(Now, Assert.Single(new DeviceAccountFile(Path).List()).RevokedAt);
    }

    [Theory]
    [InlineData("lab/hollin-vale/fir", true)]
    [InlineData("lab/hollin-vale/fir/power", true)]
    [InlineData("lab/hollin-vale/firs", false)]
    [InlineData("lab/hollin-vale/rowan", false)]
    [InlineData("gateways/a/fir", true)]
    [InlineData("gateways/a/rowan", false)]
    [InlineData("lab-out/hollin-vale/fir/state", false)]
    [InlineData("elsewhere", false)]
    public void A_device_publishes_for_its_own_source_alone(string topic, bool may)
    {
        DeviceAccountFile accounts = new(Path);
        byte[] password = System.Text.Encoding.UTF8.GetBytes(accounts.Add("fir-logger", IntakeLab.Fir, "ann", Now)!);
        DeviceDoor door = new(
            "lab-out", true, accounts, "lab", new MappingTable([new() { Topic = "gateways/+/{source}", Values = [new() { At = "/v", Channel = "power" }] }]), new IntakeLab());
        Assert.Equal(may, door.Open("fir-logger", password)!.MayPublish(topic));
        Assert.Null(door.Open("fir-logger", "no"u8.ToArray()));
        Assert.Null(door.Open(null, null));
    }

    [Theory]
    [InlineData("lab-out/#", true)]
    [InlineData("lab-out/hollin-vale/fir/state", true)]
    [InlineData("lab/hollin-vale/fir/#", true)]
    [InlineData("lab/#", false)]
    [InlineData("#", false)]
    [InlineData("+/hollin-vale/fir", false)]
    public void A_device_hears_its_own_source_and_what_the_service_says(string filter, bool may)
    {
        DeviceRights rights = new("fir-logger", "lab", "lab-out", IntakeLab.Fir, _ => null);
        Assert.Equal(may, rights.MaySubscribe(filter));
    }
}
