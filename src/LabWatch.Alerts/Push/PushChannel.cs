using System.Buffers.Text;
using System.Globalization;
using System.Net;
using System.Net.Http.Headers;
using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using LabWatch.Alerts.Messages;
using LabWatch.Alerts.Outbox;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.Push;

/// <summary>
/// Sends messages to browsers and installed apps through their push services: RFC 8030, encrypted by RFC 8291, signed by RFC 8292. The push service sees
/// when and to whom, never what.
/// </summary>
internal sealed class PushChannel(IHttpClientFactory clients, PushDesk desk, PushKeys keys, AlertsOptions options, TimeProvider clock) : INotifierChannel
{
    /// <summary>How long a push service keeps a message for a device that is off: RFC 8030, section 5.2.</summary>
    private const int KeepSeconds = 12 * 3600;

    /// <inheritdoc/>
    public NotifierKind Kind => NotifierKind.Push;

    /// <inheritdoc/>
    public async ValueTask<SendOutcome> SendAsync(Notifier notifier, OutboxMessage message, CancellationToken cancellationToken)
    {
        if (desk.Find(notifier.Id) is not { } subscription || JsonSerializer.Deserialize(message.Body, MessageJson.Default.MessageBody) is not { } body)
        {
            return new SendOutcome(SendResult.Refused, "The device has unsubscribed.");
        }

        using CancellationTokenSource timeout = new(options.WebhookTimeout, clock);
        using CancellationTokenSource both = CancellationTokenSource.CreateLinkedTokenSource(timeout.Token, cancellationToken);
        try
        {
            using HttpRequestMessage request = Build(subscription, body);
            using HttpClient client = clients.CreateClient(WebhookChannel.ClientName);
            using HttpResponseMessage response = await client.SendAsync(request, HttpCompletionOption.ResponseHeadersRead, both.Token);
            return Judge(subscription, response);
        }
        catch (OperationCanceledException) when (!cancellationToken.IsCancellationRequested)
        {
            return new SendOutcome(SendResult.Retry, string.Create(CultureInfo.InvariantCulture, $"No answer within {options.WebhookTimeout.TotalSeconds} s."));
        }
        catch (Exception exception) when (exception is HttpRequestException or IOException)
        {
            return new SendOutcome(SendResult.Retry, Finding.Quote(exception.Message));
        }
    }

    /// <summary>What is shown of a message.</summary>
    public static PushContent ContentOf(MessageBody body)
    {
        bool stands = body.Event is "raised" or "raised-again";
        string title = body.Code.Length == 0 ? AlertTexts.PushTitleTest : HazardCode.IsHazard(body.Code) ? AlertTexts.PushTitleHazard : AlertTexts.PushTitleAlert;
        return new PushContent(title, body.Headline, body.Alert.ToString(), body.Code.Length == 0 ? "/me" : $"/#alert-{body.Alert}", stands && HazardCode.IsHazard(body.Code));
    }

    private HttpRequestMessage Build(PushSubscription subscription, MessageBody body)
    {
        byte[] plain = JsonSerializer.SerializeToUtf8Bytes(ContentOf(body), PushJson.Default.PushContent);
        ByteArrayContent content = new(PushEncryption.Encrypt(
            plain, Base64Url.DecodeFromChars(subscription.PublicKey), Base64Url.DecodeFromChars(subscription.Secret)));
        content.Headers.ContentType = new MediaTypeHeaderValue("application/octet-stream");
        content.Headers.ContentEncoding.Add("aes128gcm");
        HttpRequestMessage request = new(HttpMethod.Post, subscription.Endpoint) { Content = content };
        request.Headers.Add("TTL", KeepSeconds.ToString(CultureInfo.InvariantCulture));
        request.Headers.Add("Urgency", body.Priority == "high" ? "high" : "normal");

        // A message that was not fetched yet gives way to the next one about the same alert: RFC 8030, section 5.4.
        request.Headers.Add("Topic", Base64Url.EncodeToString(SHA256.HashData(Encoding.UTF8.GetBytes(body.Alert.ToString())).AsSpan(0, 24)));
        request.Headers.TryAddWithoutValidation("Authorization", keys.Authorization(subscription.Endpoint, options.PushContactOrDefault, Instant.Now(clock)));
        return request;
    }

    private SendOutcome Judge(PushSubscription subscription, HttpResponseMessage response)
    {
        if (response.IsSuccessStatusCode)
        {
            return SendOutcome.Sent;
        }

        string error = string.Create(CultureInfo.InvariantCulture, $"The push service answered {(int)response.StatusCode}.");
        if (response.StatusCode is HttpStatusCode.NotFound or HttpStatusCode.Gone)
        {
            // RFC 8030, section 7.3: the subscription has ended.
            desk.Forget(subscription.Id);
            return new SendOutcome(SendResult.Refused, error + " The device has unsubscribed.");
        }

        bool isFinal = response.StatusCode is HttpStatusCode.BadRequest or HttpStatusCode.RequestEntityTooLarge;
        return new SendOutcome(isFinal ? SendResult.Refused : SendResult.Retry, error, response.Headers.RetryAfter?.Delta);
    }
}
