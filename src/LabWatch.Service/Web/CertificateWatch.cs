using System.Security.Cryptography;

namespace LabWatch.Service.Web;

/// <summary>Looks every minute whether there is another certificate.</summary>
internal sealed class CertificateWatch(CertificateKeeper keeper, ILogger<CertificateWatch> logger) : BackgroundService
{
    private static readonly TimeSpan Pause = TimeSpan.FromMinutes(1);

    protected override async Task ExecuteAsync(CancellationToken stoppingToken)
    {
        while (!stoppingToken.IsCancellationRequested)
        {
            await Task.Delay(Pause, TimeProvider.System, stoppingToken).ConfigureAwait(ConfigureAwaitOptions.SuppressThrowing);
            try
            {
                if (keeper.Refresh())
                {
                    WebLog.CertificateRead(logger, keeper.Current.Fingerprint);
                }
            }
            catch (Exception exception) when (exception is CryptographicException or IOException or UnauthorizedAccessException or ArgumentException)
            {
                WebLog.CertificateNotRead(logger, exception.Message);
            }
        }
    }
}
