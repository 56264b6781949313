using System.Buffers;
using LabWatch.Intake.Brokers.Embedded;
using LabWatch.Intake.Brokers.External;
using LabWatch.Intake.Diagnostics;
using LabWatch.Intake.Pipeline;
using Microsoft.Extensions.Logging.Abstractions;
using Microsoft.Extensions.Time.Testing;
using MQTTnet.Channel;
using MQTTnet.Exceptions;

namespace LabWatch.Tests.Intake;

public class LinkPartsTests
{
    [Fact]
    public async Task Acknowledgements_are_sent_in_the_order_in_which_they_are_handed_over()
    {
        using var counters = new IntakeCounters();
        using var lane = new AcknowledgementLane(counters, NullLogger.Instance);
        var sent = new List<int>();
        for (int i = 0; i < 100; i++)
        {
            int number = i;
            lane.Acknowledge(_ =>
            {
                sent.Add(number);
                return Task.CompletedTask;
            });
        }

        lane.Finish();
        await lane.RunAsync();
        Assert.Equal(Enumerable.Range(0, 100), sent);
        Assert.Equal(100, counters.Totals().Acknowledged);
    }

    [Fact]
    public async Task An_acknowledgement_of_a_former_connection_is_dropped()
    {
        using var counters = new IntakeCounters();
        using var lane = new AcknowledgementLane(counters, NullLogger.Instance);
        Task<bool> running = lane.RunAsync();
        lane.Close();
        await running;
        lane.Acknowledge(_ => throw new InvalidOperationException("must not be sent"));
        await lane.RunAsync();
        Assert.Equal(0, counters.Totals().Acknowledged);
    }

    [Fact]
    public async Task An_acknowledgement_that_fails_ends_the_lane_and_says_so()
    {
        using var counters = new IntakeCounters();
        using var lane = new AcknowledgementLane(counters, NullLogger.Instance);
        lane.Acknowledge(_ => throw new InvalidOperationException("the link is gone"));
        lane.Acknowledge(_ => Task.CompletedTask);
        Assert.False(await lane.RunAsync());
        Assert.Equal(0, counters.Totals().Acknowledged);
    }

    [Fact]
    public async Task Reading_from_the_link_pauses_at_the_limit_and_resumes_at_half()
    {
        var backlog = new ReceiveBacklog(4, 1_000);
        Task[] added = [.. Enumerable.Range(0, 4).Select(_ => backlog.AddAsync(10, TestContext.Current.CancellationToken))];
        Assert.Equal([true, true, true, false], added.Select(task => task.IsCompleted));
        backlog.Remove(10);
        Assert.False(added[3].IsCompleted);
        backlog.Remove(10);
        await added[3];
        Assert.Equal(2, backlog.Count);
    }

    [Fact]
    public async Task Reading_from_the_link_pauses_at_the_limit_of_bytes_too()
    {
        var backlog = new ReceiveBacklog(100, 1_000);
        Assert.True(backlog.AddAsync(900, TestContext.Current.CancellationToken).IsCompleted);
        Task second = backlog.AddAsync(900, TestContext.Current.CancellationToken);
        Assert.False(second.IsCompleted);
        backlog.Remove(900);
        Assert.False(second.IsCompleted);
        backlog.Remove(900);
        await second;
    }

    [Fact]
    public void A_taken_session_is_left_alone_for_the_pause()
    {
        var clock = new FakeTimeProvider();
        var guard = new TakeoverGuard(TimeSpan.FromMinutes(10), clock);
        Assert.False(guard.Note(LinkEnd.Lost, durable: true, TimeSpan.FromMinutes(1)));
        Assert.False(guard.Pausing);
        Assert.True(guard.Note(LinkEnd.TakenOver, durable: true, TimeSpan.FromMinutes(1)));
        Assert.True(guard.Pausing);
        clock.Advance(TimeSpan.FromMinutes(9));
        Assert.Equal(TimeSpan.FromMinutes(1), guard.Remaining);
        clock.Advance(TimeSpan.FromMinutes(1));
        Assert.False(guard.Pausing);
    }

    [Fact]
    public void A_series_of_short_connections_counts_as_taken()
    {
        var guard = new TakeoverGuard(TimeSpan.FromMinutes(10), new FakeTimeProvider());
        var brief = TimeSpan.FromSeconds(2);
        Assert.All(Enumerable.Range(0, 4), _ => Assert.False(guard.Note(LinkEnd.Lost, true, brief)));
        Assert.False(guard.Note(LinkEnd.Lost, true, TimeSpan.FromMinutes(1)));
        Assert.All(Enumerable.Range(0, 4), _ => Assert.False(guard.Note(LinkEnd.Lost, true, brief)));
        Assert.True(guard.Note(LinkEnd.Lost, true, brief));
    }

    [Fact]
    public void Waits_double_up_to_the_longest_and_are_jittered()
    {
        var backoff = new Backoff(TimeSpan.FromSeconds(1), TimeSpan.FromSeconds(30), new Random(1));
        double[] waits = [.. Enumerable.Range(0, 100).Select(_ => backoff.Next().TotalSeconds)];
        for (int i = 0; i < waits.Length; i++)
        {
            double whole = Math.Min(30, Math.Pow(2, Math.Min(i, 20)));
            Assert.InRange(waits[i], whole / 2, whole);
        }

        Assert.True(waits[50..].Distinct().Count() > 40);
        backoff.Reset();
        Assert.InRange(backoff.Next().TotalSeconds, 0.5, 1);
    }

    [Theory]
    [InlineData(100, 127, true)]
    [InlineData(127, 127, true)]
    [InlineData(128, 127, false)]
    [InlineData(20_000, 20_000, true)]
    [InlineData(20_001, 20_000, false)]
    public async Task A_packet_larger_than_the_limit_ends_the_link_before_its_body_is_read(int length, int limit, bool passes)
    {
        byte[] packet = [0x30, .. VariableByteInteger(length), .. new byte[length]];
        byte[] stream = [.. packet, .. packet];
        using var guard = new PacketSizeGuard(new BytesChannel(stream), limit);
        byte[] buffer = new byte[7];
        int total = 0;
        async Task ReadAll()
        {
            for (int read; (read = await guard.ReadAsync(buffer, 0, buffer.Length, TestContext.Current.CancellationToken)) > 0;)
            {
                total += read;
            }
        }

        if (passes)
        {
            await ReadAll();
            Assert.Equal(stream.Length, total);
        }
        else
        {
            await Assert.ThrowsAsync<MqttProtocolViolationException>(ReadAll);
            Assert.True(total <= buffer.Length);
        }
    }

    [Fact]
    public async Task A_length_of_five_bytes_is_refused()
    {
        // MQTT 5.0 section 1.5.5: a variable byte integer has at most four bytes.
        using var guard = new PacketSizeGuard(new BytesChannel([0x30, 0x80, 0x80, 0x80, 0x80, 0x01]), int.MaxValue);
        await Assert.ThrowsAsync<MqttProtocolViolationException>(() => guard.ReadAsync(new byte[16], 0, 16, TestContext.Current.CancellationToken));
    }

    private static IEnumerable<byte> VariableByteInteger(int value)
    {
        do
        {
            int digit = value % 128;
            value /= 128;
            yield return (byte)(value > 0 ? digit | 0x80 : digit);
        }
        while (value > 0);
    }

    private sealed class BytesChannel(byte[] bytes) : IMqttChannel
    {
        private int _position;

        public System.Security.Cryptography.X509Certificates.X509Certificate2? ClientCertificate => null;

        public System.Net.EndPoint? RemoteEndPoint => null;

        public System.Net.EndPoint? LocalEndPoint => null;

        public bool IsSecureConnection => false;

        public Task ConnectAsync(CancellationToken cancellationToken) => Task.CompletedTask;

        public Task DisconnectAsync(CancellationToken cancellationToken) => Task.CompletedTask;

        public Task<int> ReadAsync(byte[] buffer, int offset, int count, CancellationToken cancellationToken)
        {
            int read = Math.Min(count, bytes.Length - _position);
            bytes.AsSpan(_position, read).CopyTo(buffer.AsSpan(offset));
            _position += read;
            return Task.FromResult(read);
        }

        public Task WriteAsync(ReadOnlySequence<byte> buffer, bool isEndOfPacket, CancellationToken cancellationToken) => Task.CompletedTask;

        public void Dispose()
        {
        }
    }
}
