using System.Net.Sockets;
using LabWatch.Lab.Findings;
using LabWatch.Service.Commands;

namespace LabWatch.Service.Hosting;

/// <summary>Runs a built service to its end and says how it ended.</summary>
internal static class ServiceRun
{
    /// <summary>Runs until the process is asked to end.</summary>
    /// <param name="app">The service.</param>
    /// <param name="whenStarted">Gets the addresses once pages and API are served.</param>
    /// <param name="error">Gets the findings where the service cannot start.</param>
    /// <param name="cancellationToken">Ends the service.</param>
    /// <returns>An <see cref="ExitCode"/>. A part that failed gives <see cref="ExitCode.Failure"/>, so that a service manager starts it again.</returns>
    public static async Task<int> RunAsync(WebApplication app, Action<IEnumerable<string>> whenStarted, TextWriter error, CancellationToken cancellationToken)
    {
        await using (app)
        {
            try
            {
                await app.StartAsync(cancellationToken);
            }
            catch (IOException exception) when (exception.InnerException is SocketException || exception.InnerException?.InnerException is SocketException)
            {
                FindingPrinter.Write(error, [new Finding("address-in-use", "--urls", exception.Message, null, "Stop what is listening there, or choose another address with --urls.")]);
                return ExitCode.BadInput;
            }

            whenStarted(app.Urls);
            await app.WaitForShutdownAsync(cancellationToken);
            return app.Services.GetServices<IHostedService>().OfType<BackgroundService>().Any(service => service.ExecuteTask is { IsFaulted: true })
                ? ExitCode.Failure
                : ExitCode.Success;
        }
    }
}
