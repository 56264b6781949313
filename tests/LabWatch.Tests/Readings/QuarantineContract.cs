using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Readings.Quarantine;

namespace LabWatch.Tests.Readings;

/// <summary>Refused messages are kept with their reasons, newest first, within bounds, and counted for ever.</summary>
public abstract class QuarantineContract
{
    protected static CancellationToken Token => TestContext.Current.CancellationToken;

    [Fact]
    public async Task Messages_come_back_whole_newest_first_also_after_a_restart()
    {
        QuarantinedMessage[] messages = [.. Enumerable.Range(0, 5).Select(i => Message(i, $"payload {i}", $"code-{i}"))];
        using (TableQuarantine quarantine = Open())
        {
            await quarantine.AddAsync(messages, Token);
        }

        using TableQuarantine again = Open();
        IReadOnlyList<QuarantinedMessage> newest = await again.NewestAsync(3, Token);
        Assert.Equal(["payload 4", "payload 3", "payload 2"], newest.Select(one => System.Text.Encoding.UTF8.GetString(one.Payload.Span)));
        Assert.Equal((messages[4].Arrival, messages[4].Topic), (newest[0].Arrival, newest[0].Topic));
        Assert.Equal(messages[4].Findings, newest[0].Findings);
        Assert.Equal(5, await again.TotalAsync(Token));
    }

    [Fact]
    public async Task Repeats_are_counted_and_kept_once()
    {
        using TableQuarantine quarantine = Open();
        await quarantine.AddAsync([Message(0, "a", "x"), Message(1, "a", "x"), Message(2, "a", "y"), Message(3, "b", "x")], Token);
        await quarantine.AddAsync([Message(9, "a", "x")], Token);
        IReadOnlyList<QuarantinedMessage> kept = await quarantine.NewestAsync(10, Token);
        Assert.Equal(3, kept.Count);
        Assert.Equal(Instant.FromUnixSeconds(9), kept[0].Arrival);
        Assert.Equal(5, await quarantine.TotalAsync(Token));
    }

    [Fact]
    public async Task The_oldest_go_when_there_are_too_many_or_they_are_too_large()
    {
        using TableQuarantine quarantine = Open(count: 3);
        await quarantine.AddAsync([.. Enumerable.Range(0, 10).Select(i => Message(i, $"{i}", "x"))], Token);
        Assert.Equal((double[])[9, 8, 7], (await quarantine.NewestAsync(10, Token)).Select(one => (double)(one.Arrival.Microseconds / 1_000_000)));
        Assert.Equal(10, await quarantine.TotalAsync(Token));
        using TableQuarantine small = Open(bytes: 2_000, name: "small");
        await small.AddAsync([.. Enumerable.Range(0, 10).Select(i => Message(i, new string((char)('a' + i), 700), "x"))], Token);
        Assert.Equal(2, (await small.NewestAsync(10, Token)).Count);
    }

    [Fact]
    public async Task Long_payloads_topics_and_lists_are_cut()
    {
        using TableQuarantine quarantine = Open();
        Finding[] findings = [.. Enumerable.Range(0, 1000).Select(i => new Finding($"c{i}", "w", "m", null, "c"))];
        await quarantine.AddAsync([new QuarantinedMessage(default, new string('t', 100_000), new byte[1_000_000], findings)], Token);
        QuarantinedMessage kept = Assert.Single(await quarantine.NewestAsync(10, Token));
        Assert.Equal(TableQuarantine.MaximumPayloadBytes, kept.Payload.Length);
        Assert.InRange(kept.Topic.Length, 1, 1024);
        Assert.InRange(kept.Findings.Count, 1, 32);
    }

    protected static QuarantinedMessage Message(long seconds, string payload, string code) => new(
        Instant.FromUnixSeconds(seconds), "lab/hollin-vale/fir", System.Text.Encoding.UTF8.GetBytes(payload), [new Finding(code, "/0", "Wrong.", null, "Mend it.")]);

    /// <summary>Opens the quarantine of a name: the same name again finds what was kept.</summary>
    protected abstract TableQuarantine Open(int count = 100, long bytes = 1 << 20, string name = "q");
}
