using LabWatch.Alerts;
using LabWatch.Lab.Alerts;
using LabWatch.Service.Hosting;
using Microsoft.Extensions.Time.Testing;

namespace LabWatch.Tests.Service;

public sealed class StorageJudgeTests
{
    private static readonly StorageState Good = new(null, false, 0, 100L << 30, 200L << 30, 0);

    private readonly FakeTimeProvider _clock = new();
    private readonly List<string> _said = [];
    private readonly StorageJudge _judge;

    public StorageJudgeTests() => _judge = new StorageJudge(new Said(_said), "/data", _clock);

    [Fact]
    public void A_trouble_that_lasts_is_told_once_and_ends_when_it_is_gone_for_a_while()
    {
        Judge(Good, seconds: 30);
        _said.Clear();
        Judge(Good with { Trouble = "database or disk is full" }, seconds: 8);
        Assert.Empty(_said);
        Judge(Good with { Trouble = "database or disk is full" }, seconds: 60);
        Assert.Equal(["+readings-not-stored Readings are not being stored: database or disk is full"], _said);
        Judge(Good, seconds: 5);
        Judge(Good with { Trouble = "database or disk is full" }, seconds: 1);
        Judge(Good, seconds: 9);
        Assert.Single(_said);
        Judge(Good, seconds: 60);
        Assert.Equal("-readings-not-stored", _said[^1]);
        Assert.Equal(2, _said.Count);
    }

    [Fact]
    public void A_moment_of_trouble_wakes_nobody()
    {
        Judge(Good, seconds: 30);
        _said.Clear();
        for (int i = 0; i < 20; i++)
        {
            Judge(Good with { Trouble = "database is locked" }, seconds: 5);
            Judge(Good, seconds: 1);
        }

        Assert.Empty(_said);
    }

    [Fact]
    public void When_the_buffer_fails_too_it_is_told_at_once()
    {
        Judge(Good with { CommitsStopped = true, Trouble = "database or disk is full" }, seconds: 1);
        Assert.Contains("+readings-not-stored Readings are not being stored: database or disk is full", _said);
    }

    [Theory]
    [InlineData(1L << 30, 200L << 30, true)]
    [InlineData(3L << 30, 200L << 30, false)]
    [InlineData(20L << 20, 500L << 20, true)]
    [InlineData(40L << 20, 500L << 20, false)]
    public void A_disk_is_nearly_full_below_a_share_and_an_amount(long free, long size, bool isLow)
    {
        Judge(Good with { FreeBytes = free, DiskBytes = size }, seconds: 3);
        Assert.Equal(isLow ? 1 : 0, _said.Count(one => one.StartsWith("+disk-nearly-full", StringComparison.Ordinal)));
    }

    [Fact]
    public void Damage_is_told_and_stands()
    {
        Judge(Good, seconds: 1);
        Judge(Good with { Damage = 2 }, seconds: 20);
        Assert.Single(_said, one => one.StartsWith("+readings-damaged", StringComparison.Ordinal));
        Assert.Single(_said, one => one.StartsWith("-readings-damaged", StringComparison.Ordinal));
    }

    [Fact]
    public void At_the_start_alerts_of_an_earlier_run_end_where_all_is_well()
    {
        Judge(Good, seconds: 30);
        Assert.Equal(["-disk-nearly-full", "-readings-damaged", "-readings-not-stored"], _said.Order());
    }

    private void Judge(StorageState state, int seconds)
    {
        for (int i = 0; i < seconds; i++)
        {
            _judge.Judge(state);
            _clock.Advance(TimeSpan.FromSeconds(1));
        }
    }

    private sealed class Said(List<string> said) : IServiceAlerts
    {
        public void Raise(string code, AlertPriority priority, string headline, string what, string toDo) => said.Add($"+{code} {headline}");

        public void Clear(string code, string headline) => said.Add($"-{code}");
    }
}
