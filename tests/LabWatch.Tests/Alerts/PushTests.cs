using System.Buffers.Text;
using System.Net;
using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using LabWatch.Alerts;
using LabWatch.Alerts.Push;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Tests.Alerts;

/// <summary>Web Push to its receiver's end: RFC 8030, RFC 8291, RFC 8292.</summary>
public sealed class PushTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("labwatch-push-").FullName;
    private readonly SteppingClock _clock = new(TestSite.Start.ToDateTimeOffset());
    private readonly MemoryAlertLedger _ledger = new();

    [Fact]
    public void The_example_of_RFC_8291_comes_out_bit_for_bit()
    {
        // RFC 8291, section 5 and appendix A; keys and salt from memory, confirmed by the body coming out.
        byte[] receiver = Base64Url.DecodeFromChars("BCVxsr7N_eNgVRqvHtD0zTZsEc6-VV-JvLexhqUzORcxaOzi6-AYWXvTBHm4bjyPjs7Vd8pZGH6SRpkNtoIAiw4");
        byte[] secret = Base64Url.DecodeFromChars("BTBZMqHH6r4Tts7J_aSIgg");
        byte[] salt = Base64Url.DecodeFromChars("DGv6ra1nlYgDCS1FRnbzlw");
        using ECDiffieHellman sender = Key("yfWPiYE-n46HLnH0KqZOF1fJJU3MYrct3AELtAQ-oRw", "BP4z9KsN6nGRTbVYI_c7VJSPQTBtkgcy27mlmlMoZIIgDll6e3vCYLocInmYWAmS6TlzAC8wEqKK6PBru3jl7A8");

        byte[] body = PushEncryption.Encrypt("When I grow up, I want to be a watermelon"u8, receiver, secret, sender, salt);

        Assert.Equal(
            "DGv6ra1nlYgDCS1FRnbzlwAAEABBBP4z9KsN6nGRTbVYI_c7VJSPQTBtkgcy27mlmlMoZIIgDll6e3vCYLocInmYWAmS6TlzAC8wEqKK6PBru3jl7A_yl95bQpu6cVPT"
            + "pK4Mqgkf1CXztLVBSt2Ks3oZwbuwXPXLWyouBWLVWGNWQexSgSxsj_Qulcy4a-fN",
            Base64Url.EncodeToString(body));
        using ECDiffieHellman own = Key("q1dXpw3UpT5VOmu_cf_v6ih07Aems3njxI-JWgLcM94", "BCVxsr7N_eNgVRqvHtD0zTZsEc6-VV-JvLexhqUzORcxaOzi6-AYWXvTBHm4bjyPjs7Vd8pZGH6SRpkNtoIAiw4");
        using PushReader reader = new(own, secret);
        Assert.Equal("When I grow up, I want to be a watermelon", Encoding.UTF8.GetString(reader.Read(body)));
    }

    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(PushEncryption.LargestPlaintext)]
    public void What_is_sealed_is_read_and_the_body_is_within_4096_bytes(int length)
    {
        using PushReader reader = new();
        byte[] plain = RandomNumberGenerator.GetBytes(length);
        byte[] body = PushEncryption.Encrypt(plain, reader.PublicKey, reader.Secret);
        Assert.Equal(plain, reader.Read(body));
        Assert.InRange(body.Length, 1, 4096);
        Assert.NotEqual(body, PushEncryption.Encrypt(plain, reader.PublicKey, reader.Secret));
    }

    [Fact]
    public void The_key_is_made_once_and_kept_for_the_service_alone()
    {
        using PushKeys first = PushKeys.Open(_folder);
        using PushKeys second = PushKeys.Open(_folder);
        Assert.Equal(first.PublicKey, second.PublicKey);
        if (!OperatingSystem.IsWindows())
        {
            Assert.Equal(UnixFileMode.UserRead | UnixFileMode.UserWrite, File.GetUnixFileMode(Path.Combine(_folder, "keys", "push.pem")));
        }
    }

    [Fact]
    public void The_authorization_is_a_token_for_the_origin_that_the_public_key_verifies()
    {
        using PushKeys keys = PushKeys.Open(_folder);
        string header = keys.Authorization(new Uri("https://push.example:8443/p/1?x=2"), "mailto:duty@hollin-vale.example", TestSite.Start);

        // RFC 8292, sections 2 and 3: vapid t=JWT, k=key; claims aud, exp (at most 24 h ahead) and sub; ES256 by RFC 7518, section 3.4.
        string[] parts = header["vapid t=".Length..].Split(", k=");
        Assert.Equal(keys.PublicKey, parts[1]);
        string[] token = parts[0].Split('.');
        JsonElement claims = JsonDocument.Parse(Base64Url.DecodeFromChars(token[1])).RootElement;
        Assert.Equal("https://push.example:8443", claims.GetProperty("aud").GetString());
        Assert.Equal("mailto:duty@hollin-vale.example", claims.GetProperty("sub").GetString());
        long ahead = claims.GetProperty("exp").GetInt64() - TestSite.Start.ToDateTimeOffset().ToUnixTimeSeconds();
        Assert.InRange(ahead, 60, 24 * 3600);
        byte[] point = Base64Url.DecodeFromChars(keys.PublicKey);
        using ECDsa verifier = ECDsa.Create(new ECParameters { Curve = ECCurve.NamedCurves.nistP256, Q = new ECPoint { X = point[1..33], Y = point[33..] } });
        Assert.True(verifier.VerifyData(
            Encoding.ASCII.GetBytes(token[0] + "." + token[1]), Base64Url.DecodeFromChars(token[2]), HashAlgorithmName.SHA256, DSASignatureFormat.IeeeP1363FixedFieldConcatenation));
    }

    [Fact]
    public void What_is_no_subscription_is_refused_with_all_that_is_wrong()
    {
        using PushKeys keys = PushKeys.Open(_folder);
        PushDesk desk = Desk(keys);
        Assert.Equal(["bad-endpoint", "bad-key", "bad-key"], desk.Add("tess", "phone", "http://push.example/1", "AAAA", "BBBB").Findings.Select(finding => finding.Code));
        string notOnCurve = Base64Url.EncodeToString([4, .. Enumerable.Repeat((byte)7, 64)]);
        Assert.Equal(["bad-key"], desk.Add("tess", "phone", "https://push.example/1", notOnCurve, Base64Url.EncodeToString(new byte[16])).Findings.Select(finding => finding.Code));
        Assert.Empty(desk.Notifiers);
    }

    [Fact]
    public void Subscriptions_outlive_a_restart_and_belong_to_their_person()
    {
        using PushKeys keys = PushKeys.Open(_folder);
        using PushReader reader = new();
        PushSubscription made = Add(Desk(keys), reader);
        PushDesk again = Desk(keys);
        Assert.Equal(made, Assert.Single(again.DevicesOf("tess")));
        Assert.False(again.Remove("uli", made.Id));
        Assert.True(again.Remove("tess", made.Id));
        Assert.Empty(Desk(keys).Notifiers);
    }

    [Fact]
    public async Task A_hazard_reaches_the_subscribed_device_sealed_and_urgent()
    {
        using PushReader reader = new();
        await using AlertsHost host = Subscribed(reader);
        await host.StartAsync();
        host.Send(186);
        await AlertsHost.UntilAsync(() => host.Receiver.Received.Any(request => request.Address.Host == "push.example"), "the push message");

        ReceivedRequest received = host.Receiver.Received.First(request => request.Address.Host == "push.example");
        Assert.Equal("aes128gcm", received.Headers["Content-Encoding"]);
        Assert.Equal("high", received.Headers["Urgency"]);
        Assert.True(int.Parse(received.Headers["TTL"], System.Globalization.CultureInfo.InvariantCulture) > 0);
        Assert.Equal(32, received.Headers["Topic"].Length);
        Assert.StartsWith("vapid t=", received.Headers["Authorization"], StringComparison.Ordinal);
        JsonElement shown = JsonDocument.Parse(reader.Read(received.Body)).RootElement;
        Assert.Equal("Hazard", shown.GetProperty("title").GetString());
        Assert.Contains("this surface sensor reads 186 degC", shown.GetProperty("body").GetString(), StringComparison.Ordinal);
        Assert.True(shown.GetProperty("isUrgent").GetBoolean());
        await host.StopAsync();
    }

    [Theory]
    [InlineData(HttpStatusCode.Gone, true)]
    [InlineData(HttpStatusCode.NotFound, true)]
    [InlineData(HttpStatusCode.BadRequest, false)]
    public async Task A_subscription_that_has_ended_is_forgotten_and_a_refused_message_is_given_up(HttpStatusCode status, bool isForgotten)
    {
        using PushReader reader = new();
        await using AlertsHost host = Subscribed(reader);
        host.Receiver.Answer = (_, _) => Task.FromResult(new HttpResponseMessage(status));
        await host.StartAsync();
        host.Send(186);
        await AlertsHost.UntilAsync(() => _ledger.Messages.Any(message => message.Notifier.StartsWith("push-", StringComparison.Ordinal) && message.GivenUpAt is not null), "giving up");
        using PushKeys keys = PushKeys.Open(_folder);
        Assert.Equal(isForgotten, Desk(keys).Notifiers.Count == 0);
        await host.StopAsync();
    }

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private AlertsHost Subscribed(PushReader reader)
    {
        using PushKeys keys = PushKeys.Open(_folder);
        Add(Desk(keys), reader);
        return new AlertsHost(_folder, _clock, _ledger, TestSite.Lab(TestSite.Source(TestSite.Rowan, TestSite.Surface(TestSite.Rowan))));
    }

    private PushDesk Desk(PushKeys keys) =>
        new(new AlertsOptions { DataDirectory = _folder }, keys, _clock, NullLogger<PushDesk>.Instance);

    private static PushSubscription Add(PushDesk desk, PushReader reader) =>
        desk.Add("tess", "Tess's phone", "https://push.example/p/1", Base64Url.EncodeToString(reader.PublicKey), Base64Url.EncodeToString(reader.Secret)).Made!;

    private static ECDiffieHellman Key(string d, string point)
    {
        byte[] q = Base64Url.DecodeFromChars(point);
        return ECDiffieHellman.Create(new ECParameters { Curve = ECCurve.NamedCurves.nistP256, D = Base64Url.DecodeFromChars(d), Q = new ECPoint { X = q[1..33], Y = q[33..] } });
    }
}
