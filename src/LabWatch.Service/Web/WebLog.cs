namespace LabWatch.Service.Web;

/// <summary>Log messages about how pages and API are served (7700 to 7799).</summary>
internal static partial class WebLog
{
    [LoggerMessage(7700, LogLevel.Information, "Another certificate is in force, SHA-256 {Fingerprint}")]
    public static partial void CertificateRead(ILogger logger, string fingerprint);

    [LoggerMessage(7701, LogLevel.Error, "The changed certificate cannot be read; the one before stays in force: {Reason}")]
    public static partial void CertificateNotRead(ILogger logger, string reason);
}
