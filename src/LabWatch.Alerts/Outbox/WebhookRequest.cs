using System.Net.Http.Headers;
using System.Text;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.Outbox;

/// <summary>Builds the request of a webhook: JSON, an idempotency key, and a signature where a secret is named.</summary>
internal static class WebhookRequest
{
    private const string Label = "labwatch";

    /// <summary>The request for a message.</summary>
    /// <param name="notifier">The notifier; its address is absolute.</param>
    /// <param name="message">The message.</param>
    /// <param name="secret">The secret that the notifier names; null where it names none.</param>
    /// <param name="now">Time of the signature.</param>
    public static HttpRequestMessage Build(Notifier notifier, OutboxMessage message, byte[]? secret, Instant now)
    {
        byte[] body = Encoding.UTF8.GetBytes(message.Body);
        string digest = MessageSignature.ContentDigest(body);
        string key = $"\"{message.Id}\"";
        ByteArrayContent content = new(body);
        content.Headers.ContentType = new MediaTypeHeaderValue("application/json");
        HttpRequestMessage request = new(HttpMethod.Post, notifier.Address) { Content = content };
        content.Headers.Add("Content-Digest", digest);
        request.Headers.Add("Idempotency-Key", key);
        request.Headers.UserAgent.Add(new ProductInfoHeaderValue("LabWatch", null));
        if (secret is not null)
        {
            Sign(request, notifier, digest, key, secret, now);
        }

        return request;
    }

    private static void Sign(HttpRequestMessage request, Notifier notifier, string digest, string key, byte[] secret, Instant now)
    {
        (string, string)[] components =
            [("@method", "POST"), ("@target-uri", notifier.Address!.AbsoluteUri), ("content-digest", digest), ("idempotency-key", key)];
        string parameters = MessageSignature.Parameters(components.Select(component => component.Item1), now, notifier.SecretName!);
        string signature = MessageSignature.Sign(secret, MessageSignature.Base(components, parameters));
        request.Headers.Add("Signature-Input", $"{Label}={parameters}");
        request.Headers.Add("Signature", $"{Label}=:{signature}:");
    }
}
