using System.Buffers;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Payloads;
using LabWatch.Intake.Pipeline;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;
using LabWatch.Readings;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Tests.Intake;

public class PipelineTests
{
    [Fact]
    public async Task Messages_are_stored_and_acknowledged_in_order_of_receipt()
    {
        await using var rig = new PipelineRig();
        Send(rig, 1, 200);
        await PipelineRig.UntilAsync(() => rig.Acknowledged.Count == 200);
        Assert.Equal(Names(1, 200), rig.Acknowledged);
        Assert.Equal(Numbers(1, 200), rig.Store.Values);
        Assert.True(rig.Spool.IsEmpty);
    }

    [Fact]
    public async Task Nothing_is_acknowledged_before_it_is_durable_and_one_commit_takes_what_came_meanwhile()
    {
        await using var rig = new PipelineRig();
        rig.Store.Hang();
        Send(rig, 1, 1);
        await PipelineRig.UntilAsync(() => rig.Store.Appends.Count == 1);
        Send(rig, 2, 50);
        Assert.Empty(rig.Acknowledged);
        Assert.Equal(Numbers(1, 50), rig.Tap.Values);
        rig.Store.GoOn();
        await PipelineRig.UntilAsync(() => rig.Acknowledged.Count == 50);
        Assert.Equal([1, 49], rig.Store.Appends);
        Assert.Equal(Names(1, 50), rig.Acknowledged);
    }

    [Fact]
    public async Task A_store_that_does_not_answer_within_a_second_sends_messages_to_the_spool_and_gets_them_back_in_order()
    {
        await using var rig = new PipelineRig();
        rig.Store.Hang();
        Send(rig, 1, 3);
        await PipelineRig.UntilAsync(() => rig.Store.Appends.Count == 1);
        await rig.AdvanceUntilAsync(() => rig.Acknowledged.Count == 3);
        Send(rig, 4, 10);
        await rig.AdvanceUntilAsync(() => rig.Acknowledged.Count == 10);
        Assert.False(rig.Spool.IsEmpty);
        Assert.Empty(rig.Store.Values);
        Assert.Equal(Numbers(1, 10), rig.Tap.Values);

        rig.Store.GoOn();
        await rig.AdvanceUntilAsync(() => rig.Spool.IsEmpty);
        Assert.Equal(Numbers(1, 10), rig.Store.Values);
        Assert.Equal(Names(1, 10), rig.Acknowledged);
        Assert.False(rig.Store.Overlapped);
    }

    [Fact]
    public async Task What_waits_in_the_spool_is_never_overtaken()
    {
        await using var rig = new PipelineRig();
        rig.Store.Failure = new StoreUnavailableException("closed");
        rig.SendText("first", PipelineRig.Pack(1, 5));
        await rig.AdvanceUntilAsync(() => rig.Acknowledged.Count == 1);
        rig.SendText("second", PipelineRig.Pack(2, 5));
        await rig.AdvanceUntilAsync(() => rig.Acknowledged.Count == 2);
        rig.Store.Failure = null;
        await rig.AdvanceUntilAsync(() => rig.Spool.IsEmpty && rig.Quarantine.Messages.Count == 1);

        // The first value stays, the second is a conflict, as if the store had never been away.
        Assert.Equal([1], rig.Store.Values);
        Assert.Equal(IntakeCode.ConflictingValue, rig.Quarantine.Messages[0].Findings[0].Code);
        Send(rig, 3, 3);
        await rig.AdvanceUntilAsync(() => rig.Acknowledged.Count == 3);
        Assert.True(rig.Spool.IsEmpty);
    }

    [Fact]
    public async Task A_full_spool_stops_commits_while_taps_go_on_and_they_resume_by_themselves()
    {
        await using var rig = new PipelineRig(spoolLimit: 3_000);
        rig.Store.Failure = new StoreUnavailableException("disk full");
        for (int i = 1; i <= 100; i++)
        {
            Assert.True(rig.Send(i));
        }

        await rig.AdvanceUntilAsync(() => rig.Signal.Stopped);
        Assert.Equal(Numbers(1, 100), rig.Tap.Values);
        Assert.True(rig.Acknowledged.Count < 100);
        Assert.InRange(rig.Spool.Bytes, 0, 3_000);

        rig.Store.Failure = null;
        await rig.AdvanceUntilAsync(() => rig.Acknowledged.Count == 100 && rig.Spool.IsEmpty);
        Assert.False(rig.Signal.Stopped);
        Assert.Equal(Numbers(1, 100), rig.Store.Values);
        Assert.Equal(Names(1, 100), rig.Acknowledged);
    }

    [Fact]
    public async Task A_failing_spool_stops_commits_until_the_disk_is_back()
    {
        using var directory = new TemporaryDirectory();
        string path = Path.Combine(directory.Path, "spool");
        await using var rig = new PipelineRig(path);
        Directory.Delete(path);
        rig.Store.Hang();
        Send(rig, 1, 2);
        await PipelineRig.UntilAsync(() => rig.Store.Appends.Count == 1);
        await rig.AdvanceUntilAsync(() => rig.Signal.Stopped);
        Assert.Empty(rig.Acknowledged);
        Directory.CreateDirectory(path);
        await rig.AdvanceUntilAsync(() => rig.Acknowledged.Count == 2);
        Assert.False(rig.Signal.Stopped);
        rig.Store.GoOn();
        await rig.AdvanceUntilAsync(() => rig.Spool.IsEmpty);
        Assert.Equal([1, 2], rig.Store.Values);
    }

    [Fact]
    public async Task Malformed_payloads_are_in_quarantine_before_they_are_acknowledged()
    {
        await using var rig = new PipelineRig();
        rig.Quarantine.Failure = new StoreUnavailableException("closed");
        rig.SendText("bad", "[{");
        await rig.AdvanceUntilAsync(() => rig.Acknowledged.Count == 1);
        Assert.False(rig.Spool.IsEmpty);
        rig.Quarantine.Failure = null;
        await rig.AdvanceUntilAsync(() => rig.Spool.IsEmpty);
        Assert.Equal("[{"u8.ToArray(), rig.Quarantine.Messages[0].Payload.ToArray());
        Assert.Equal(IntakeCode.MalformedJson, rig.Quarantine.Messages[0].Findings[0].Code);
    }

    [Fact]
    public async Task A_pack_with_a_bad_record_keeps_its_good_ones_and_quarantines_the_message()
    {
        await using var rig = new PipelineRig();
        rig.SendText("half", """[{"n":"well-2","v":5},{"n":"nothing","v":6}]""");
        await PipelineRig.UntilAsync(() => rig.Acknowledged.Count == 1);
        Assert.Equal([5], rig.Store.Values);
        Assert.Equal(IntakeCode.UnknownChannel, Assert.Single(rig.Quarantine.Messages).Findings[0].Code);
    }

    [Fact]
    public async Task A_repeat_changes_nothing_and_a_conflict_goes_to_quarantine_as_a_pack_that_would_send_it_again()
    {
        await using var rig = new PipelineRig();
        rig.SendText("first", PipelineRig.Pack(1, 5));
        rig.SendText("repeat", PipelineRig.Pack(1, 5));
        rig.SendText("conflict", PipelineRig.Pack(2, 5));
        await PipelineRig.UntilAsync(() => rig.Acknowledged.Count == 3);
        Assert.Equal((1, 1, 1), (rig.Counters.Totals().Committed, rig.Counters.Totals().Duplicates, rig.Counters.Totals().Conflicts));
        var kept = Assert.Single(rig.Quarantine.Messages);
        DecodedMessage again = DecodingBench.Decode(kept.Payload.ToArray(), kept.Topic, false, DecodingBench.Decoder());
        Assert.Equal((2.0, DecodingBench.Arrival.Microseconds - 999_995), (again.Pack!.Readings[0].Value, again.Pack.Readings[0].Time.Microseconds));
    }

    [Fact]
    public async Task A_pack_that_the_store_chokes_on_goes_to_quarantine_and_does_not_hold_up_the_others()
    {
        await using var rig = new PipelineRig();
        rig.Store.Poison = 3;
        rig.Store.Hang();
        Send(rig, 1, 1);
        await PipelineRig.UntilAsync(() => rig.Store.Appends.Count == 1);
        Send(rig, 2, 5);
        rig.Store.GoOn();
        await rig.AdvanceUntilAsync(() => rig.Acknowledged.Count == 5 && rig.Spool.IsEmpty && rig.Store.Values.Count == 4);
        Assert.Equal([1, 2, 4, 5], rig.Store.Values);
        Assert.Equal(IntakeCode.StoreRefused, Assert.Single(rig.Quarantine.Messages).Findings[0].Code);
    }

    [Fact]
    public async Task What_an_earlier_run_left_in_the_spool_is_moved_after_the_start()
    {
        using var directory = new TemporaryDirectory();
        await using (var first = new PipelineRig(directory.Path))
        {
            first.Store.Hang();
            Send(first, 1, 4);
            await PipelineRig.UntilAsync(() => first.Store.Appends.Count == 1);
            await first.AdvanceUntilAsync(() => first.Acknowledged.Count == 4);
            await first.StopCommitter.CancelAsync();
        }

        await using var second = new PipelineRig(directory.Path);
        await second.AdvanceUntilAsync(() => second.Spool.IsEmpty);
        Assert.Equal(Numbers(1, 4), second.Store.Values.Order());
    }

    [Fact]
    public async Task Stopping_finishes_what_was_accepted_and_refuses_what_comes()
    {
        await using var rig = new PipelineRig();
        Send(rig, 1, 50);
        rig.Queue.Close();
        Assert.False(rig.Send(51));
        await rig.Committing;
        Assert.Equal(Names(1, 50), rig.Acknowledged);
        Assert.Equal(51, rig.Tap.Values.Count);
    }

    [Fact]
    public async Task Stopping_without_store_and_spool_abandons_and_never_acknowledges()
    {
        await using var rig = new PipelineRig(spoolLimit: 10);
        rig.Store.Failure = new StoreUnavailableException("gone");
        Send(rig, 1, 3);
        await rig.AdvanceUntilAsync(() => rig.Signal.Stopped);
        Send(rig, 4, 5);
        rig.Queue.Close();
        await rig.StopCommitter.CancelAsync();
        await rig.Committing;
        Assert.Equal(["abandoned 1", "abandoned 2", "abandoned 3", "abandoned 4", "abandoned 5"], rig.Acknowledged);
    }

    [Fact]
    public async Task A_tap_that_throws_harms_nobody()
    {
        await using var rig = new PipelineRig(moreTaps: new ThrowingTap());
        Send(rig, 1, 1);
        await PipelineRig.UntilAsync(() => rig.Acknowledged.Count == 1);
        Assert.Equal([1], rig.Tap.Values);
    }

    [Fact]
    public void Every_source_is_taken_whatever_its_hash()
    {
        // String hashes differ from run to run; with 64 names half of them are negative.
        SourceKey[] keys = [.. Enumerable.Range(0, 64).Select(number => new SourceKey("hollin-vale", $"source-{number}"))];
        Assert.Contains(keys, key => key.GetHashCode() < 0);
        using var counters = new IntakeCounters();
        var queue = new IntakeQueue(100, 10_000);
        var intake = new MessageIntake(
            new PayloadDecoder(new IntakeLab { Current = IntakeLab.Snapshot(keys) }, "lab", new PayloadLimits(), new ReadingTimeRule(), new LabWatch.Intake.Payloads.Mapped.MappingTable([])),
            [],
            queue,
            counters,
            new ReadingTimeRule(),
            TimeProvider.System,
            NullLogger<MessageIntake>.Instance);
        foreach (SourceKey key in keys)
        {
            Assert.True(intake.TryAccept($"lab/{key.Site}/{key.Source}/power", new ReadOnlySequence<byte>("1"u8.ToArray()), false, NoDelivery.Instance));
        }

        Assert.Equal(64, queue.Count);
    }

    [Fact]
    public void The_queue_is_bounded_in_number_and_bytes()
    {
        var queue = new IntakeQueue(3, 100);
        Assert.True(queue.TryAdd(Item(60)));
        Assert.False(queue.TryAdd(Item(60)));
        Assert.True(queue.TryAdd(Item(10)));
        Assert.True(queue.IsHalfFull);
        Assert.True(queue.TryAdd(Item(10)));
        Assert.False(queue.TryAdd(Item(1)));
        Assert.Equal(2, queue.Take(2, int.MaxValue).Count);
        Assert.True(queue.TryAdd(Item(80)));
    }

    private static IntakeItem Item(long bytes) => new(default, NoDelivery.Instance, bytes);

    private static void Send(PipelineRig rig, int from, int to)
    {
        for (int i = from; i <= to; i++)
        {
            Assert.True(rig.Send(i));
        }
    }

    private static IEnumerable<string> Names(int from, int to) =>
        Enumerable.Range(from, to - from + 1).Select(number => number.ToString(System.Globalization.CultureInfo.InvariantCulture));

    private static IEnumerable<double> Numbers(int from, int to) => Enumerable.Range(from, to - from + 1).Select(number => (double)number);

    private sealed class ThrowingTap : IReadingTap
    {
        public void OnPack(ReadingPack pack) => throw new InvalidOperationException("defect");
    }
}
