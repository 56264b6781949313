using System.Text.Json;
using LabWatch.Lab.Alerts;

namespace LabWatch.Tests.Alerts;

/// <summary>What others watch this service by, and what it says when nothing reaches it.</summary>
public sealed class WatcherTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("labwatch-watcher-").FullName;
    private readonly SteppingClock _clock = new(TestSite.Start.ToDateTimeOffset());
    private readonly MemoryAlertLedger _ledger = new();

    [Fact]
    public async Task A_file_beats_while_the_desk_answers_and_says_how_things_stand()
    {
        await using AlertsHost host = new(_folder, _clock, _ledger);
        await host.StartAsync();
        host.Send(186);
        string path = Path.Combine(_folder, "heartbeat.json");
        await host.UntilAsync(() => File.Exists(path) && Standing(path) == 1, "the beat with a standing hazard", TimeSpan.FromSeconds(1));
        await host.StopAsync();
    }

    [Fact]
    public async Task When_no_reading_of_any_source_arrives_people_are_told_and_told_again_when_they_do()
    {
        await using AlertsHost host = new(_folder, _clock, _ledger);
        await host.StartAsync();
        host.Send(20);
        await host.UntilAsync(() => host.Board.View().Open.Any(alert => alert.Code == ServiceAlertCode.NoReadings), "the alert", TimeSpan.FromSeconds(1));
        await host.UntilAsync(
            () =>
            {
                host.Send(20);
                return host.Board.View().Open.All(alert => alert.Code != ServiceAlertCode.NoReadings || alert.ReturnedAt is not null);
            },
            "its end", TimeSpan.FromSeconds(1));
        await host.StopAsync();
    }

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private static int Standing(string path)
    {
        try
        {
            return JsonDocument.Parse(File.ReadAllText(path)).RootElement.GetProperty("standingHazards").GetInt32();
        }
        catch (IOException)
        {
            return -1;
        }
    }
}
