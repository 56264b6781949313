namespace LabWatch.Service.Api;

/// <summary>Log messages of the API (7500 to 7599).</summary>
internal static partial class ApiLog
{
    [LoggerMessage(7500, LogLevel.Warning, "Looking for changes to show failed; the pages are told again at the next look.")]
    public static partial void LookFailed(ILogger logger, Exception failure);

    [LoggerMessage(7501, LogLevel.Error, "{Method} {Path} failed.")]
    public static partial void RequestFailed(ILogger logger, Exception failure, string method, string path);

    [LoggerMessage(7502, LogLevel.Warning, "A part that the service depends on does not answer: {Part}.")]
    public static partial void PartFailed(ILogger logger, Exception failure, string part);

    [LoggerMessage(7504, LogLevel.Error, "A revision is on record but not in force: {Finding}")]
    public static partial void NotInForce(ILogger logger, Lab.Findings.Finding finding);

    [LoggerMessage(7503, LogLevel.Information, "The pages are not built: {Folder} has no index.html.")]
    public static partial void PagesMissing(ILogger logger, string folder);
}
