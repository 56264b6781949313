using System.Globalization;
using System.Net;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Secrets;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;

namespace LabWatch.Alerts.Outbox;

/// <summary>Posts messages to an address. Redirects are not followed; an answer is read up to a bound and never trusted.</summary>
internal sealed class WebhookChannel(IHttpClientFactory clients, NamedSecrets secrets, AlertsOptions options, TimeProvider clock) : INotifierChannel
{
    /// <summary>Name of the HTTP client.</summary>
    public const string ClientName = "labwatch-webhook";

    private const int LongestAnswer = 300;

    /// <inheritdoc/>
    public NotifierKind Kind => NotifierKind.Webhook;

    /// <inheritdoc/>
    public async ValueTask<SendOutcome> SendAsync(Notifier notifier, OutboxMessage message, CancellationToken cancellationToken)
    {
        byte[]? secret = notifier.SecretName is { } name ? secrets.Find(name) : null;
        if (notifier.Address is null || (notifier.SecretName is not null && secret is null))
        {
            string missing = notifier.Address is null ? "the notifier has no address" : $"the secret {Finding.Quote(notifier.SecretName)} was not found";
            return new SendOutcome(SendResult.Retry, $"Not sent: {missing}.");
        }

        using CancellationTokenSource timeout = new(options.WebhookTimeout, clock);
        using CancellationTokenSource both = CancellationTokenSource.CreateLinkedTokenSource(timeout.Token, cancellationToken);
        try
        {
            using HttpRequestMessage request = WebhookRequest.Build(notifier, message, secret, Instant.Now(clock));
            using HttpClient client = clients.CreateClient(ClientName);
            using HttpResponseMessage response = await client.SendAsync(request, HttpCompletionOption.ResponseHeadersRead, both.Token);
            return await JudgeAsync(response, both.Token);
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

    private async Task<SendOutcome> JudgeAsync(HttpResponseMessage response, CancellationToken cancellationToken)
    {
        if (response.IsSuccessStatusCode)
        {
            return SendOutcome.Sent;
        }

        string answer = await ReadAsync(response, cancellationToken);
        string error = string.Create(CultureInfo.InvariantCulture, $"Answer {(int)response.StatusCode} {Explain(response)}{answer}");
        return new SendOutcome(IsFinal(response.StatusCode) ? SendResult.Refused : SendResult.Retry, error.TrimEnd(), RetryAfter(response));
    }

    // The receiver says that this message will never be taken. Everything else may be mended at its end while we keep trying.
    private static bool IsFinal(HttpStatusCode status) => status is
        HttpStatusCode.BadRequest or HttpStatusCode.Gone or HttpStatusCode.RequestEntityTooLarge or HttpStatusCode.UnsupportedMediaType or HttpStatusCode.UnprocessableEntity;

    private static string Explain(HttpResponseMessage response) =>
        (int)response.StatusCode is >= 300 and < 400 ? "(redirects are not followed: name the final address) " : string.Empty;

    private TimeSpan? RetryAfter(HttpResponseMessage response) => response.Headers.RetryAfter switch
    {
        { Delta: { } delta } => delta,
        { Date: { } date } => date - clock.GetUtcNow(),
        _ => null,
    };

    private static async Task<string> ReadAsync(HttpResponseMessage response, CancellationToken cancellationToken)
    {
        await using Stream stream = await response.Content.ReadAsStreamAsync(cancellationToken);
        byte[] buffer = new byte[LongestAnswer];
        int read = await stream.ReadAtLeastAsync(buffer, buffer.Length, throwOnEndOfStream: false, cancellationToken);
        return Finding.Quote(System.Text.Encoding.UTF8.GetString(buffer, 0, read)) ?? string.Empty;
    }
}
