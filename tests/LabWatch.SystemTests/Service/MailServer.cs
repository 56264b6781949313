using System.Buffers;
using System.Collections.Concurrent;
using System.Security.Cryptography.X509Certificates;
using MimeKit;
using SmtpServer;
using SmtpServer.Authentication;
using SmtpServer.ComponentModel;
using SmtpServer.Protocol;
using SmtpServer.Storage;

namespace LabWatch.SystemTests.Service;

/// <summary>A real SMTP server that takes mails only over TLS and from who signs in.</summary>
internal sealed class MailServer : IAsyncDisposable
{
    private readonly CancellationTokenSource _stopping = new();
    private readonly ConcurrentQueue<MimeMessage> _mails = new();
    private Task _running = Task.CompletedTask;

    /// <summary>Its port.</summary>
    public int Port { get; } = LabWatchProcess.FreePort();

    /// <summary>What it took, in order.</summary>
    public IReadOnlyCollection<MimeMessage> Mails => _mails;

    /// <summary>Starts it for one user.</summary>
    public static MailServer Start(X509Certificate2 certificate, string user, string password)
    {
        MailServer server = new();
        ISmtpServerOptions options = new SmtpServerOptionsBuilder()
            .ServerName("localhost")
            .Endpoint(endpoint => endpoint.Port(server.Port).Certificate(certificate).AuthenticationRequired().AllowUnsecureAuthentication(false))
            .Build();
        ServiceProvider services = new();
        services.Add(new Store(server._mails));
        services.Add(new DelegatingUserAuthenticator((name, word) => name == user && word == password));
        server._running = new SmtpServer.SmtpServer(options, services).StartAsync(server._stopping.Token);
        return server;
    }

    public async ValueTask DisposeAsync()
    {
        await _stopping.CancelAsync();
        try
        {
            await _running;
        }
        catch (OperationCanceledException)
        {
            // Stopped as asked.
        }

        _stopping.Dispose();
    }

    private sealed class Store(ConcurrentQueue<MimeMessage> mails) : MessageStore
    {
        public override async Task<SmtpResponse> SaveAsync(
            ISessionContext context, IMessageTransaction transaction, ReadOnlySequence<byte> buffer, CancellationToken cancellationToken)
        {
            using MemoryStream stream = new(buffer.ToArray());
            mails.Enqueue(await MimeMessage.LoadAsync(stream, cancellationToken));
            return SmtpResponse.Ok;
        }
    }
}
