using System.Globalization;
using System.Net.Sockets;
using System.Security.Authentication;
using System.Text;
using System.Text.Json;
using LabWatch.Alerts.Outbox;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Secrets;
using LabWatch.Lab.Time;
using LabWatch.Records.Alerts;
using MailKit;
using MailKit.Net.Smtp;
using MailKit.Security;

namespace LabWatch.Alerts.Mail;

/// <summary>Sends messages as e-mail over SMTP with TLS.</summary>
internal sealed class MailChannel(NamedSecrets secrets, MailWriter writer, AlertsOptions options, TimeProvider clock) : INotifierChannel
{
    /// <inheritdoc/>
    public NotifierKind Kind => NotifierKind.Mail;

    /// <inheritdoc/>
    public async ValueTask<SendOutcome> SendAsync(Notifier notifier, OutboxMessage message, CancellationToken cancellationToken)
    {
        if (options.MailHost is null || options.MailFrom is null || notifier.Address is null)
        {
            return new SendOutcome(SendResult.Retry, "Not sent: no mail server is configured (Alerts:MailHost and Alerts:MailFrom).");
        }

        byte[]? password = options.MailSecretName is { } name ? secrets.Find(name) : null;
        if (options.MailSecretName is not null && password is null)
        {
            return new SendOutcome(SendResult.Retry, $"Not sent: the secret {Finding.Quote(options.MailSecretName)} was not found.");
        }

        if (JsonSerializer.Deserialize(message.Body, MessageJson.Default.MessageBody) is not { } body)
        {
            return new SendOutcome(SendResult.Refused, "The message cannot be read.");
        }

        using CancellationTokenSource timeout = new(options.MailTimeout, clock);
        using CancellationTokenSource both = CancellationTokenSource.CreateLinkedTokenSource(timeout.Token, cancellationToken);
        try
        {
            using MimeKit.MimeMessage mail = writer.Write(notifier, body, Instant.Now(clock));
            await SendAsync(mail, password, both.Token);
            return SendOutcome.Sent;
        }
        catch (OperationCanceledException) when (!cancellationToken.IsCancellationRequested)
        {
            return new SendOutcome(SendResult.Retry, string.Create(CultureInfo.InvariantCulture, $"The mail server did not take it within {options.MailTimeout.TotalSeconds} s."));
        }
        catch (SmtpCommandException exception)
        {
            // 5yz: the server will never take this message (RFC 5321, section 4.2.1); anything about access may be mended.
            bool isFinal = exception.ErrorCode is SmtpErrorCode.RecipientNotAccepted or SmtpErrorCode.MessageNotAccepted && (int)exception.StatusCode >= 500;
            return new SendOutcome(isFinal ? SendResult.Refused : SendResult.Retry, Finding.Quote(exception.Message));
        }
        catch (Exception exception) when (
            exception is IOException or SocketException or ProtocolException or System.Security.Authentication.AuthenticationException
                or MailKit.Security.AuthenticationException or SslHandshakeException or NotSupportedException or ServiceNotConnectedException)
        {
            return new SendOutcome(SendResult.Retry, Finding.Quote(exception.Message));
        }
    }

    private async Task SendAsync(MimeKit.MimeMessage mail, byte[]? password, CancellationToken cancellationToken)
    {
        using SmtpClient client = new() { SslProtocols = SslProtocols.Tls12 | SslProtocols.Tls13, CheckCertificateRevocation = false };
        SecureSocketOptions security = options.MailSecurity switch
        {
            MailSecurity.Tls => SecureSocketOptions.SslOnConnect,
            MailSecurity.None => SecureSocketOptions.None,
            _ => SecureSocketOptions.StartTls,
        };
        await client.ConnectAsync(options.MailHost!, options.MailPort, security, cancellationToken);
        if (password is not null)
        {
            await client.AuthenticateAsync(Encoding.UTF8, options.MailUser ?? options.MailFrom!, Encoding.UTF8.GetString(password), cancellationToken);
        }

        await client.SendAsync(mail, cancellationToken);

        // The server has it: whatever happens on the way out does not send it again.
        try
        {
            await client.DisconnectAsync(quit: true, cancellationToken);
        }
        catch (Exception exception) when (exception is IOException or SocketException or ProtocolException or OperationCanceledException)
        {
            // A server that hangs up first has taken the message all the same.
        }
    }
}
