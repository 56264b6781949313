using System.Diagnostics.CodeAnalysis;
using System.Net.Sockets;
using LabWatch.Lab.Time;
using Microsoft.Extensions.Hosting;
using Microsoft.Extensions.Logging;
using MQTTnet.Exceptions;

namespace LabWatch.Simulator.Demo;

/// <summary>
/// Publishes the demo lab over MQTT: history as fast as the broker acknowledges, and live packs once a second beside it over a connection of their own.
/// </summary>
[SuppressMessage("Performance", "CA1812", Justification = "Made by the container.")]
internal sealed class DemoPublisher(DemoOptions options, DemoEngine engine, TimeProvider clock, ILogger<DemoPublisher> logger) : BackgroundService
{
    private const int HistoryChunkSecond = 1200;
    private const int HistoryConnections = 16;
    private static readonly TimeSpan FirstPause = TimeSpan.FromMilliseconds(500);
    private static readonly TimeSpan LongestPause = TimeSpan.FromSeconds(10);
    private static readonly TimeSpan KeepLiveEvery = TimeSpan.FromSeconds(30);
    private static readonly TimeSpan KeepHistoryEvery = TimeSpan.FromSeconds(3);
    private static readonly TimeSpan LongestWait = TimeSpan.FromSeconds(1);

    private readonly string[] _topics = [.. DemoLab.Designs.Select(design => $"{options.TopicRoot}/{DemoLab.Site}/{design.Id}")];

    /// <inheritdoc/>
    protected override Task ExecuteAsync(CancellationToken stoppingToken)
    {
        if (!engine.IsFirstStart && (engine.State.Seed != options.Seed))
        {
            Log.OptionsIgnored(logger, engine.State.Seed);
        }

        return Task.WhenAll(
            Task.Run(() => KeepAlive("demo-live", 1, LiveAsync, stoppingToken), stoppingToken),
            Task.Run(() => KeepAlive("demo-history", HistoryConnections, HistoryAsync, stoppingToken), stoppingToken));
    }

    // The outermost loop: whatever ends a session is logged, and the next one starts from what was acknowledged. Nothing is lost.
    private async Task KeepAlive(string clientId, int connections, Func<PackPublisher, CancellationToken, Task> session, CancellationToken stopping)
    {
        TimeSpan pause = FirstPause;
        while (!stopping.IsCancellationRequested)
        {
            long began = clock.GetTimestamp();
            try
            {
                await using PackPublisher publisher = await PackPublisher.ConnectAsync(options, clientId, connections, clock, stopping);
                Log.Connected(logger, clientId, options.Host, options.Port);
                await session(publisher, stopping);
                return;
            }
            catch (OperationCanceledException) when (stopping.IsCancellationRequested)
            {
                return;
            }
            catch (Exception error)
            {
                pause = clock.GetElapsedTime(began) > LongestPause ? FirstPause : pause;
                if (error is MqttCommunicationException or MqttClientNotConnectedException or IOException or SocketException)
                {
                    Log.BrokerLost(logger, clientId, error.Message, pause);
                }
                else
                {
                    Log.SessionFailed(logger, clientId, pause, error);
                }
            }

            await Task.Delay(pause * (0.75 + (0.5 * Random.Shared.NextDouble())), clock, stopping).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
            pause = pause * 2 < LongestPause ? pause * 2 : LongestPause;
        }
    }

    private async Task LiveAsync(PackPublisher publisher, CancellationToken stopping)
    {
        SenmlWriter writer = new(DemoLab.Designs);
        List<Task> sent = [];
        while (true)
        {
            LabSimulation lab = engine.ResumeLive(Instant.Now(clock));
            long kept = clock.GetTimestamp();
            try
            {
                while (await IsInReach(lab.Second + 1, stopping))
                {
                    await SendSecond(publisher, lab, lab.Second + 1, writer, sent, stopping);
                    await Task.WhenAll(sent);
                    sent.Clear();
                    if (clock.GetElapsedTime(kept) >= KeepLiveEvery)
                    {
                        engine.LiveDone(lab.Capture());
                        kept = clock.GetTimestamp();
                    }
                }

                engine.LiveDone(lab.Capture());
            }
            catch (OperationCanceledException) when (stopping.IsCancellationRequested && sent.Count == 0)
            {
                engine.LiveDone(lab.Capture());
                throw;
            }
        }
    }

    // True as soon as a second has come; false where it lies so far back that the live part has to be cut.
    private async Task<bool> IsInReach(long second, CancellationToken stopping)
    {
        while (true)
        {
            TimeSpan ahead = Instant.FromUnixSeconds(second) - Instant.Now(clock);
            if (ahead <= TimeSpan.Zero)
            {
                return -ahead <= 2 * DemoEngine.LongestCatchUp;
            }

            await Task.Delay(ahead < LongestWait ? ahead : LongestWait, clock, stopping);
        }
    }

    private async Task HistoryAsync(PackPublisher publisher, CancellationToken stopping)
    {
        SenmlWriter writer = new(DemoLab.Designs);
        while (true)
        {
            if (engine.NextHistory() is { } segment)
            {
                Log.HistoryStarted(logger, Instant.FromUnixSeconds(segment.DoneUpTo), Instant.FromUnixSeconds(segment.To));
                await Fill(publisher, segment, writer, stopping);
                Log.HistoryFilled(logger, Instant.FromUnixSeconds(segment.From), Instant.FromUnixSeconds(segment.To));
            }

            await Task.Delay(LongestWait, clock, stopping);
        }
    }

    private async Task Fill(PackPublisher publisher, HistorySegment segment, SenmlWriter writer, CancellationToken stopping)
    {
        LabSimulation lab = engine.ResumeHistory(segment);
        List<Task> sent = [];
        long kept = clock.GetTimestamp();
        while (lab.Second < segment.To - 1)
        {
            long end = Math.Min(lab.Second + HistoryChunkSecond, segment.To - 1);
            for (long second = Following(lab.Second); second <= end; second += DemoEngine.HistoryStepSecond)
            {
                await SendSecond(publisher, lab, second, writer, sent, stopping);
            }

            await Task.WhenAll(sent);
            sent.Clear();
            lab.AdvanceTo(end);
            bool keep = end >= segment.To - 1 || clock.GetElapsedTime(kept) >= KeepHistoryEvery;
            engine.HistoryDone(segment, lab.Capture(), keep);
            kept = keep ? clock.GetTimestamp() : kept;
        }
    }

    private async Task SendSecond(PackPublisher publisher, LabSimulation lab, long second, SenmlWriter writer, List<Task> sent, CancellationToken stopping)
    {
        byte[][] packs = new byte[_topics.Length][];
        lab.Produce(second, writer, (source, pack) => packs[source] = pack);
        for (int i = 0; i < packs.Length; i++)
        {
            sent.Add(await publisher.SendAsync(_topics[i], packs[i], stopping));
        }
    }

    private static long Following(long second) => (second / DemoEngine.HistoryStepSecond * DemoEngine.HistoryStepSecond) + DemoEngine.HistoryStepSecond;
}
