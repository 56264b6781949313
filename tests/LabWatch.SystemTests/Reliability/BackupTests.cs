using System.Diagnostics;
using LabWatch.Lab.Time;
using LabWatch.SystemTests.Service;

namespace LabWatch.SystemTests.Reliability;

/// <summary>A backup is taken while the service runs under load, killed and taken again, and a restored service goes on from it.</summary>
public sealed class BackupTests
{
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(120);

    [Fact]
    public async Task A_backup_under_load_survives_kills_and_a_restored_service_goes_on()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        int rounds = TestLength.Of(shortForm: 1, longForm: 10);
        Random random = new(5);
        long first = (Instant.Now(TimeProvider.System) - TimeSpan.FromHours(2)).StartOfHour().Microseconds;
        await using ServiceFixture fixture = new();
        await fixture.StartAsync(token);
        await using PersistentDevice device = new(fixture.BrokerPort, "lab/sample/fir", "well-1", first);
        device.Start();
        using TemporaryDirectory copies = new();
        int lost = 0;
        int acknowledged = 0;
        for (int round = 0; round < rounds; round++)
        {
            int before = device.Acknowledged.Count;
            await Poll.UntilAsync("readings are acknowledged", () => Task.FromResult(device.Acknowledged.Count > before + 300), Patience, token, () => fixture.Service.Output);
            string target = copies.At($"copy-{round}{(round % 2 == 0 ? string.Empty : ".tar")}");
            KeyValuePair<long, double>[] promised = [.. device.Acknowledged];
            await KillAsync(["backup", "--data", fixture.Data, "--to", target], TimeSpan.FromMilliseconds(random.Next(200, 700)), token);
            if (!File.Exists(target) && !Directory.Exists(target))
            {
                promised = [.. device.Acknowledged];
                await RunAsync(["backup", "--data", fixture.Data, "--to", target], token);
            }

            await fixture.Service.KillAsync();
            Directory.Move(fixture.Data, copies.At($"former-{round}"));
            string said = await RunAsync(["restore", "--from", target, "--data", fixture.Data], token);
            Assert.Contains("each has the digest", said, StringComparison.Ordinal);
            await fixture.StartAsync(token);
            Dictionary<long, double> stored = (await fixture.ReadAsync("well-1", first, device.Acknowledged.Keys.Max() + 1, token)).ToDictionary(one => one.Time, one => one.Value);
            lost += promised.Count(sent => !stored.TryGetValue(sent.Key, out double value) || value != sent.Value);
            acknowledged += promised.Length;
            int stuck = device.Acknowledged.Count;
            await Poll.UntilAsync("the restored service takes readings", () => Task.FromResult(device.Acknowledged.Count > stuck + 50), Patience, token, () => fixture.Service.Output);
        }

        await device.FinishAsync(Patience);
        await RunAsync(["verify", "--data", fixture.Data], token);
        ReliabilityReport.Record(
            "backup and restore", "backup under load, killed (kill -9) at a random moment, taken again, restored", $"{rounds} times",
            "the restored service verified against its trail and went on taking readings; the count is of readings acknowledged before the backup began", acknowledged, lost, 0);
        Assert.Equal(0, lost);
    }

    [Fact]
    public async Task A_restore_refuses_a_directory_with_something_in_it_and_a_service_refuses_half_a_restore()
    {
        CancellationToken token = TestContext.Current.CancellationToken;
        using TemporaryDirectory folder = new();
        Directory.CreateDirectory(folder.At("data"));
        await File.WriteAllTextAsync(folder.At("data", "restore-incomplete"), "", token);
        (int code, string output) = await LabWatchProcess.RunAsync(["restore", "--from", folder.At("none"), "--data", folder.At("data")], token);
        Assert.Equal(2, code);
        Assert.Contains("never overwrites", output, StringComparison.Ordinal);
        (code, output) = await LabWatchProcess.RunAsync(["serve", "--data", folder.At("data")], token);
        Assert.Equal(2, code);
        Assert.Contains("did not come to its end", output, StringComparison.Ordinal);
        (code, output) = await LabWatchProcess.RunAsync(["restore", "--from", folder.At("none"), "--data", folder.At("new")], token);
        Assert.Equal(2, code);
        Assert.Contains("There is no backup under this name", output, StringComparison.Ordinal);
    }

    private static async Task<string> RunAsync(string[] arguments, CancellationToken token)
    {
        (int code, string output) = await LabWatchProcess.RunAsync(arguments, token);
        Assert.True(code == 0, output);
        return output;
    }

    private static async Task KillAsync(string[] arguments, TimeSpan after, CancellationToken token)
    {
        using Process process = LabWatchProcess.Begin(arguments);
        await Task.Delay(after, TimeProvider.System, token);
        process.Kill();
        await process.WaitForExitAsync(token);
    }
}
