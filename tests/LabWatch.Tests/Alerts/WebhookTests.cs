using System.Net;
using System.Net.Http.Headers;
using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using LabWatch.Alerts.Outbox;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Secrets;
using LabWatch.Records.Alerts;

namespace LabWatch.Tests.Alerts;

/// <summary>The webhook at its receiver's end: what arrives, how it is signed, when it comes again.</summary>
public sealed class WebhookTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("labwatch-webhook-").FullName;
    private readonly SteppingClock _clock = new(TestSite.Start.ToDateTimeOffset());
    private readonly MemoryAlertLedger _ledger = new();

    [Fact]
    public void The_signature_base_and_signature_are_those_of_the_standards_example()
    {
        // RFC 9421, appendix B.2.5 (hmac-sha256) with the secret of B.1.5; text from memory, confirmed by the signature coming out.
        byte[] secret = Convert.FromBase64String("uzvJfB4u3N0Jy4T7NZ75MDVcr8zSTInedJtkgcu46YW4XByzNJjxBdtjUkdJPBtbmHhIDi6pcl8jsasjlTMtDQ==");
        const string Parameters = "(\"date\" \"@authority\" \"content-type\");created=1618884473;keyid=\"test-shared-secret\"";
        string signatureBase = MessageSignature.Base(
            [("date", "Tue, 20 Apr 2021 02:07:55 GMT"), ("@authority", "example.com"), ("content-type", "application/json")], Parameters);
        Assert.Equal("pxcQw6G3AjtMBQjwo8XzkZf/bws5LelbaMk5rGIGtE8=", MessageSignature.Sign(secret, signatureBase));
    }

    [Fact]
    public void The_content_digest_is_that_of_the_standards_example()
    {
        // RFC 9530, appendix D (and RFC 9421, B.2): the body {"hello": "world"}; text from memory, confirmed by the digest coming out.
        Assert.Equal("sha-256=:X48E9qOokqqrvdts8nOJRJN3OWDUoyWxBf7kbu9DBPE=:", MessageSignature.ContentDigest("{\"hello\": \"world\"}"u8));
    }

    [Fact]
    public async Task A_request_carries_key_digest_and_a_signature_that_the_receiver_can_check()
    {
        File.WriteAllText(Path.Combine(_folder, "hook-secret"), "correct horse\n");
        OutboxMessage message = Message();
        Notifier notifier = new("hook", NotifierKind.Webhook, new Uri("https://messages.example/labwatch?team=1"), "hook-secret");
        byte[] secret = new NamedSecrets(_folder, _ => null).Find("hook-secret")!;
        using HttpRequestMessage request = WebhookRequest.Build(notifier, message, secret, TestSite.Start);
        byte[] body = await request.Content!.ReadAsByteArrayAsync(TestContext.Current.CancellationToken);
        Assert.Equal(message.Body, Encoding.UTF8.GetString(body));
        Assert.Equal($"\"{message.Id}\"", request.Headers.GetValues("Idempotency-Key").Single());
        string input = request.Headers.GetValues("Signature-Input").Single();
        Assert.StartsWith("labwatch=(\"@method\" \"@target-uri\" \"content-digest\" \"idempotency-key\");created=1796112000;", input, StringComparison.Ordinal);
        string expected = "\"@method\": POST\n\"@target-uri\": https://messages.example/labwatch?team=1\n"
            + $"\"content-digest\": sha-256=:{Convert.ToBase64String(SHA256.HashData(body))}:\n\"idempotency-key\": \"{message.Id}\"\n"
            + $"\"@signature-params\": {input["labwatch=".Length..]}";
        string signature = Convert.ToBase64String(HMACSHA256.HashData(Encoding.UTF8.GetBytes("correct horse"), Encoding.UTF8.GetBytes(expected)));
        Assert.Equal($"labwatch=:{signature}:", request.Headers.GetValues("Signature").Single());
    }

    [Fact]
    public async Task A_failing_receiver_gets_the_same_message_again_until_it_takes_it()
    {
        await using AlertsHost host = Host((number, _) => Answer(number < 4 ? HttpStatusCode.ServiceUnavailable : HttpStatusCode.OK));
        await host.StartAsync();
        host.Send(186);
        await host.UntilAsync(() => _ledger.Messages.Any(message => message is { Notifier: "hook", SentAt: not null }), "delivery", TimeSpan.FromSeconds(1));
        Assert.Single(host.Receiver.Received.Select(request => request.Headers["Idempotency-Key"]).Distinct());
        Assert.Equal(4, _ledger.Messages.Single(message => message.Notifier == "hook").Attempts);
        await host.StopAsync();
    }

    [Fact]
    public async Task A_refused_message_is_given_up_at_once_and_later_ones_are_still_sent()
    {
        await using AlertsHost host = Host((number, _) => Answer(number == 1 ? HttpStatusCode.BadRequest : HttpStatusCode.OK));
        await host.StartAsync();
        host.Send(186);
        await AlertsHost.UntilAsync(() => _ledger.Messages.Any(message => message.GivenUpAt is not null), "giving up");
        await host.Board.AcknowledgeAsync(host.Board.View().Open[0].Id, "A. Person", null, TestContext.Current.CancellationToken);
        await AlertsHost.UntilAsync(() => host.Receiver.Received.Count == 2, "the next message");
        Assert.StartsWith("Answer 400", _ledger.Messages.Single(message => message.GivenUpAt is not null).LastError, StringComparison.Ordinal);
        await host.StopAsync();
    }

    [Fact]
    public async Task A_message_that_nobody_takes_is_given_up_after_the_stated_time()
    {
        await using AlertsHost host = Host((_, _) => throw new HttpRequestException("no network"));
        await host.StartAsync();
        host.Send(186);
        await host.UntilAsync(() => _ledger.Messages.Any(message => message.GivenUpAt is not null), "giving up", TimeSpan.FromMinutes(2));
        OutboxMessage given = _ledger.Messages.First(message => message is { Notifier: "hook", GivenUpAt: not null });
        Assert.InRange(given.GivenUpAt!.Value - given.QueuedAt, TimeSpan.FromHours(23.8), TimeSpan.FromHours(24.1));
        Assert.Equal("no network", given.LastError);
        await host.StopAsync();
    }

    [Fact]
    public async Task A_receiver_that_never_answers_is_timed_out_and_holds_no_other_hazard_up()
    {
        WebhookReceiver receiver = new()
        {
            Answer = async (number, token) =>
            {
                await Task.Delay(number == 1 ? Timeout.InfiniteTimeSpan : TimeSpan.Zero, TimeProvider.System, token);
                return new HttpResponseMessage(HttpStatusCode.OK);
            },
        };
        LabWatch.Lab.LabSnapshot lab = TestSite.Lab(
            [new Notifier("hook", NotifierKind.Webhook, new Uri("https://messages.example/"), null)], [], [],
            TestSite.Source(TestSite.Rowan, TestSite.Surface(TestSite.Rowan)), TestSite.Source(TestSite.Yew, TestSite.Surface(TestSite.Yew)));
        await using AlertsHost two = new(_folder, _clock, _ledger, lab, receiver);
        await two.StartAsync();
        two.Send(186);
        await AlertsHost.UntilAsync(() => two.Receiver.Received.Count == 1, "the first");
        LabWatch.Lab.Time.Instant now = LabWatch.Lab.Time.Instant.Now(_clock);
        two.Tap.OnPack(new LabWatch.Lab.Readings.ReadingPack(TestSite.Yew, now, [new LabWatch.Lab.Readings.Reading("case", now, 186)]));
        await AlertsHost.UntilAsync(() => two.Receiver.Received.Count == 2, "the second beside the first");
        await two.UntilAsync(() => two.Receiver.Received.Count == 3, "the first again", TimeSpan.FromSeconds(1));
        await two.StopAsync();
    }

    [Theory]
    [InlineData(HttpStatusCode.Redirect, "redirects are not followed")]
    [InlineData(HttpStatusCode.Unauthorized, "Answer 401")]
    [InlineData(HttpStatusCode.NotFound, "Answer 404")]
    public async Task A_receiver_that_is_set_up_wrongly_is_tried_again_because_somebody_may_mend_it(HttpStatusCode status, string said)
    {
        SendOutcome outcome = await SendAsync(new HttpResponseMessage(status) { Headers = { Location = new Uri("https://elsewhere.example/") } });
        Assert.Equal(SendResult.Retry, outcome.Result);
        Assert.Contains(said, outcome.Error, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_huge_garbled_answer_is_cut()
    {
        SendOutcome outcome = await SendAsync(new HttpResponseMessage(HttpStatusCode.InternalServerError) { Content = new ByteArrayContent(new byte[50_000_000]) });
        Assert.InRange(outcome.Error!.Length, 1, 250);
        Assert.DoesNotContain(outcome.Error, char.IsControl);
    }

    [Fact]
    public async Task Retry_after_is_read_as_seconds_and_as_a_date()
    {
        HttpResponseMessage seconds = new(HttpStatusCode.TooManyRequests);
        seconds.Headers.RetryAfter = new RetryConditionHeaderValue(TimeSpan.FromSeconds(90));
        Assert.Equal(TimeSpan.FromSeconds(90), (await SendAsync(seconds)).RetryAfter);
        HttpResponseMessage date = new(HttpStatusCode.TooManyRequests);
        date.Headers.RetryAfter = new RetryConditionHeaderValue(_clock.GetUtcNow() + TimeSpan.FromMinutes(2));
        Assert.Equal(TimeSpan.FromMinutes(2), (await SendAsync(date)).RetryAfter);
    }

    [Fact]
    public async Task A_secret_that_is_missing_keeps_the_message_back()
    {
        SendOutcome outcome = await SendAsync(new HttpResponseMessage(HttpStatusCode.OK), secretName: "absent");
        Assert.Equal(SendResult.Retry, outcome.Result);
        Assert.Contains("absent", outcome.Error, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("../hook-secret")]
    [InlineData("..")]
    [InlineData("")]
    [InlineData("a/b")]
    public void A_secret_is_never_looked_for_outside_its_folder(string name)
    {
        Directory.CreateDirectory(Path.Combine(_folder, "inner"));
        File.WriteAllText(Path.Combine(_folder, "hook-secret"), "x");
        Assert.Null(new NamedSecrets(Path.Combine(_folder, "inner"), _ => null).Find(name));
    }

    [Fact]
    public void A_secret_comes_from_the_environment_where_no_file_holds_it() =>
        Assert.Equal("s3"u8.ToArray(), new NamedSecrets(_folder, name => name == "LABWATCH_SECRET_HOOK_KEY" ? "s3" : null).Find("hook-key"));

    [Theory]
    [InlineData(1, 0, 0.0, 1)]
    [InlineData(1, 0, 0.999, 1.999)]
    [InlineData(4, 0, 0.0, 8)]
    [InlineData(1000, 0, 0.0, 150)]
    [InlineData(1, 120, 0.0, 120)]
    [InlineData(1, 86400, 0.0, 300)]
    [InlineData(1, -5, 0.0, 1)]
    public void Waits_double_with_jitter_and_a_receivers_wish_is_obeyed_within_bounds(int attempts, int asked, double random, double seconds)
    {
        RetrySchedule schedule = new(TimeSpan.FromSeconds(2), TimeSpan.FromMinutes(5));
        Assert.Equal(seconds, schedule.After(attempts, asked == 0 ? null : TimeSpan.FromSeconds(asked), random).TotalSeconds, 1e-6);
    }

    [Fact]
    public void The_body_says_everything_a_gateway_needs()
    {
        JsonElement body = JsonDocument.Parse(Message().Body).RootElement;
        Assert.Equal("raised", body.GetProperty("event").GetString());
        Assert.Equal("high", body.GetProperty("priority").GetString());
        Assert.Equal("raised-unacknowledged", body.GetProperty("state").GetString());
        Assert.Equal("hollin-vale.rowan", body.GetProperty("source").GetString());
        Assert.Contains("no protective device", body.GetProperty("caution").GetString(), StringComparison.Ordinal);
    }

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private AlertsHost Host(Func<int, CancellationToken, Task<HttpResponseMessage>> answer) => new(_folder, _clock, _ledger, receiver: new WebhookReceiver { Answer = answer });

    private async Task<SendOutcome> SendAsync(HttpResponseMessage answer, string? secretName = null)
    {
        WebhookReceiver receiver = new() { Answer = (_, _) => Task.FromResult(answer) };
        WebhookChannel channel = new(new OneClient(receiver), new NamedSecrets(_folder, _ => null), new() { DataDirectory = _folder }, _clock);
        Notifier notifier = new("hook", NotifierKind.Webhook, new Uri("https://messages.example/"), secretName);
        return await channel.SendAsync(notifier, Message(), TestContext.Current.CancellationToken);
    }

    private static OutboxMessage Message()
    {
        WatchBench bench = new(TestSite.OneSurface());
        bench.Send(186);
        LabWatch.Alerts.LifeCycle.AlertCondition found = bench.Conditions.Found[0];
        AlertTransition step = LabWatch.Alerts.LifeCycle.AlertLifeCycle.Next(null, found)!;
        return MessageFactory.For(step, found.Headline, found.Detail, [new Notifier("hook", NotifierKind.Webhook, null, null)])[0];
    }

    private static Task<HttpResponseMessage> Answer(HttpStatusCode status) => Task.FromResult(new HttpResponseMessage(status));

    private sealed class OneClient(HttpMessageHandler handler) : IHttpClientFactory
    {
        public HttpClient CreateClient(string name) => new(handler, disposeHandler: false);
    }
}
