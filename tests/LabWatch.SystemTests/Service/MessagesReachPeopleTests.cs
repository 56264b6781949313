using System.Buffers.Text;
using System.Globalization;
using System.Net.Http.Json;
using System.Security.Cryptography;
using System.Security.Cryptography.X509Certificates;
using System.Text;
using System.Text.Json;
using LabWatch.Tests.Alerts;
using Microsoft.Playwright;
using MimeKit;

namespace LabWatch.SystemTests.Service;

/// <summary>
/// A hazard reaches people: by mail over STARTTLS, by a signed webhook over TLS, and by Web Push to the installed app, whose browser shows it. No push
/// service can be reached here, so that a server of the test stands for it and reads by RFC 8291; what it read is given to the browser by its
/// developer tools.
/// </summary>
public sealed class MessagesReachPeopleTests
{
    private const string Password = "heron-slate-lantern";
    private const string GatewayKey = "copper-weir-dusk";
    private static readonly TimeSpan Long = TimeSpan.FromSeconds(120);

    [Fact]
    public async Task A_hazard_arrives_by_mail_webhook_and_push_and_the_app_shows_it()
    {
        Assert.SkipUnless(OperatingSystem.IsLinux(), "Which certificates a process trusts is told by SSL_CERT_FILE on Linux only.");
        Browser.SkipWhereMissing();
        CancellationToken token = TestContext.Current.CancellationToken;
        using TemporaryDirectory directory = new();
        using X509Certificate2 certificate = TestCertificate.Make(directory.At("trusted.pem"));
        await using MailServer mail = MailServer.Start(certificate, "labwatch", Password);
        await using HttpsReceiver receiver = HttpsReceiver.Start(certificate);
        using PushReader device = new();
        await using ServiceFixture fixture = new(text => WithNotifiers(text, receiver.Address));
        Configure(fixture, directory.At("trusted.pem"), mail.Port);
        await fixture.StartAsync(token);
        await SubscribeAsync(fixture.Service, new Uri(receiver.Address, "push/1"), device, token);

        await using SurfaceDevice surface = await SurfaceDevice.ConnectAsync(fixture.BrokerPort, token);
        await surface.PublishAsync(186, token);
        await Poll.UntilAsync(
            "the hazard has arrived in all three ways",
            async () =>
            {
                await surface.PublishAsync(186, token);
                return mail.Mails.Any(IsHot) && receiver.At("/messages").Any(IsHot) && receiver.At("/push/1").Any(pushed => IsHot(device.Read(pushed.Body)));
            },
            Long, token, () => fixture.Service.Output);

        JsonElement alert = Assert.Single(await fixture.OpenAlertsAsync("hot-surface", token));
        await MailIsRightAsync(mail.Mails.First(IsHot), fixture, alert, token);
        WebhookIsSigned(receiver.At("/messages").First(IsHot), receiver.Address);
        byte[] read = receiver.At("/push/1").Select(pushed => device.Read(pushed.Body)).First(IsHot);
        await WhoWasToldIsOnRecordAsync(fixture, alert, token);
        await AppShowsAsync(fixture, read, token);
    }

    private static string WithNotifiers(string text, Uri receiver) => text
        .Replace("https://messages.example/labwatch", new Uri(receiver, "messages").AbsoluteUri, StringComparison.Ordinal)
        .Replace("\"notifiers\": [", "\"notifiers\": [ { \"id\": \"duty\", \"kind\": \"mail\", \"address\": \"duty@hollin-vale.example\" },", StringComparison.Ordinal);

    private static void Configure(ServiceFixture fixture, string trusted, int mailPort)
    {
        fixture.Environment["SSL_CERT_FILE"] = trusted;
        fixture.Environment["LABWATCH__Alerts__MailHost"] = "localhost";
        fixture.Environment["LABWATCH__Alerts__MailPort"] = mailPort.ToString(CultureInfo.InvariantCulture);
        fixture.Environment["LABWATCH__Alerts__MailFrom"] = "labwatch@hollin-vale.example";
        fixture.Environment["LABWATCH__Alerts__MailUser"] = "labwatch";
        fixture.Environment["LABWATCH__Alerts__MailSecretName"] = "mail-password";
        fixture.Environment["LABWATCH__Alerts__PublicAddress"] = "https://labwatch.hollin-vale.example";
        fixture.Environment["LABWATCH_SECRET_MAIL_PASSWORD"] = Password;
        fixture.Environment["LABWATCH_SECRET_GATEWAY_KEY"] = GatewayKey;
    }

    private static async Task SubscribeAsync(LabWatchProcess service, Uri endpoint, PushReader device, CancellationToken token)
    {
        var keys = new { p256dh = Base64Url.EncodeToString(device.PublicKey), auth = Base64Url.EncodeToString(device.Secret) };
        JsonElement made = await service.PostAsync("api/v1/me/devices", new { name = "Phone", endpoint = endpoint.AbsoluteUri, keys }, token);
        Assert.Equal("Phone", made.GetProperty("name").GetString());
    }

    private static bool IsHot(MimeMessage mail) => mail.Subject!.Contains("186 degC", StringComparison.Ordinal);

    private static bool IsHot((string Path, IReadOnlyDictionary<string, string> Headers, byte[] Body) posted) => IsHot(posted.Body);

    private static bool IsHot(byte[] text) => Encoding.UTF8.GetString(text).Contains("this surface sensor reads 186 degC", StringComparison.Ordinal);

    private static async Task MailIsRightAsync(MimeMessage mail, ServiceFixture fixture, JsonElement alert, CancellationToken token)
    {
        Assert.Equal("duty@hollin-vale.example", Assert.Single(mail.To.Mailboxes).Address);
        Assert.Contains("Treat as hot.", mail.Subject!, StringComparison.Ordinal);
        Assert.Contains("LabWatch is no protective device", mail.TextBody!, StringComparison.Ordinal);
        const string Link = "https://labwatch.hollin-vale.example/?acknowledge=";
        string rest = mail.TextBody![(mail.TextBody!.IndexOf(Link, StringComparison.Ordinal) + Link.Length)..];
        string link = rest.Split('\r', '\n')[0].Trim();
        JsonElement led = await fixture.Service.Client.GetFromJsonAsync<JsonElement>("api/v1/alerts/links/" + link, token);
        Assert.Equal(alert.GetProperty("id").GetGuid(), led.GetProperty("alert").GetGuid());
    }

    private static void WebhookIsSigned((string Path, IReadOnlyDictionary<string, string> Headers, byte[] Body) posted, Uri receiver)
    {
        // RFC 9421, section 2.5, and RFC 9530, section 2, as the receiver does it.
        string digest = $"sha-256=:{Convert.ToBase64String(SHA256.HashData(posted.Body))}:";
        Assert.Equal(digest, posted.Headers["Content-Digest"]);
        string signed = $"\"@method\": POST\n\"@target-uri\": {new Uri(receiver, "messages").AbsoluteUri}\n\"content-digest\": {digest}\n"
            + $"\"idempotency-key\": {posted.Headers["Idempotency-Key"]}\n\"@signature-params\": {posted.Headers["Signature-Input"]["labwatch=".Length..]}";
        string signature = Convert.ToBase64String(HMACSHA256.HashData(Encoding.UTF8.GetBytes(GatewayKey), Encoding.UTF8.GetBytes(signed)));
        Assert.Equal($"labwatch=:{signature}:", posted.Headers["Signature"]);
    }

    private static async Task WhoWasToldIsOnRecordAsync(ServiceFixture fixture, JsonElement alert, CancellationToken token)
    {
        string path = $"api/v1/alerts/{alert.GetProperty("id").GetString()}/messages";
        JsonElement told = default;
        await Poll.UntilAsync(
            "all messages are on record as sent",
            async () =>
            {
                told = (await fixture.Service.Client.GetFromJsonAsync<JsonElement>(path, token)).GetProperty("items");
                return told.GetArrayLength() >= 3 && told.EnumerateArray().All(message => message.GetProperty("sentAt").ValueKind == JsonValueKind.String);
            },
            Long, token, () => told.ToString());
        Assert.Contains(told.EnumerateArray(), message => message.GetProperty("account").GetString() == "first");
    }

    private static async Task AppShowsAsync(ServiceFixture fixture, byte[] message, CancellationToken token)
    {
        await using Browser browser = await Browser.StartAsync();
        IPage page = await browser.OpenAsync(new Uri(fixture.Service.Address, "sign-in"), 390, 844);
        string origin = fixture.Service.Address.GetLeftPart(UriPartial.Authority);
        await page.Context.GrantPermissionsAsync(["notifications"], new() { Origin = origin });
        Person person = new(page, 390);
        await person.SignInAsync("first", SignedIn.Password);
        await page.EvaluateAsync("navigator.serviceWorker.ready.then(() => true)");

        ICDPSession tools = await page.Context.NewCDPSessionAsync(page);
        TaskCompletionSource<string> registered = new(TaskCreationOptions.RunContinuationsAsynchronously);
        tools.Event("ServiceWorker.workerRegistrationUpdated").OnEvent += (_, update) =>
        {
            foreach (JsonElement registration in update!.Value.GetProperty("registrations").EnumerateArray())
            {
                registered.TrySetResult(registration.GetProperty("registrationId").GetString()!);
            }
        };
        await tools.SendAsync("ServiceWorker.enable");
        string registrationId = await registered.Task.WaitAsync(Long, TimeProvider.System, token);
        await tools.SendAsync("ServiceWorker.deliverPushMessage", new Dictionary<string, object>
        {
            ["origin"] = origin,
            ["registrationId"] = registrationId,
            ["data"] = Encoding.UTF8.GetString(message),
        });

        string shown = string.Empty;
        await Poll.UntilAsync(
            "the browser shows the notification",
            async () =>
            {
                shown = await page.EvaluateAsync<string>(
                    "navigator.serviceWorker.ready.then((worker) => worker.getNotifications()).then((all) => all.map((one) => one.title + ' | ' + one.body).join())");
                return shown.Length > 0;
            },
            Long, token);
        Assert.StartsWith("LabWatch: Hazard | ", shown, StringComparison.Ordinal);
        Assert.Contains("this surface sensor reads 186 degC", shown, StringComparison.Ordinal);

        JsonElement manifest = (await tools.SendAsync("Page.getAppManifest"))!.Value;
        Assert.Equal(0, manifest.GetProperty("errors").GetArrayLength());
        await person.OpenAsync("/me", page.GetByRole(AriaRole.Heading, new() { Name = "Phones and browsers that are told" }));
        await person.SeeAsync(page.Locator("#devices .row").Filter(new() { HasText = "Phone" }));
        if (Environment.GetEnvironmentVariable("LABWATCH_TEST_PICTURES") is { } pictures)
        {
            await page.ScreenshotAsync(new() { Path = Path.Combine(pictures, "devices-390.png"), FullPage = true });
        }
    }
}
