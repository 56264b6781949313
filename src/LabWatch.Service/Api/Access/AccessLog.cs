namespace LabWatch.Service.Api.Access;

/// <summary>Log messages about people (7600 to 7699). Never a password, code, token or cookie; the code of the set-up is the one exception.</summary>
internal static partial class AccessLog
{
    [LoggerMessage(7600, LogLevel.Debug, "The last uses of sessions are not on the record yet: {Reason}")]
    public static partial void UsesNotKept(ILogger logger, string reason);

    [LoggerMessage(7601, LogLevel.Warning, "Nobody has an account yet. Open the page /set-up and enter the code {Code} (also in {Path}): it makes the first administrator and is good once.")]
    public static partial void SetUpNeeded(ILogger logger, string code, string path);

    [LoggerMessage(7602, LogLevel.Warning, "Whether anybody has an account cannot be told yet; trying again: {Reason}")]
    public static partial void SetUpUnknown(ILogger logger, string reason);

    [LoggerMessage(7603, LogLevel.Warning, "Refused sign-ins are not on the record yet; trying again: {Reason}")]
    public static partial void RefusalsNotKept(ILogger logger, string reason);

    [LoggerMessage(7604, LogLevel.Warning, "Sign-in refused for {Account}, {Count} time(s) since the last such line.")]
    public static partial void Refused(ILogger logger, string account, int count);

    [LoggerMessage(7605, LogLevel.Information, "Set-up is done: {Name} is the first administrator.")]
    public static partial void SetUpDone(ILogger logger, string name);

    [LoggerMessage(7606, LogLevel.Warning, "The demo's people cannot be recorded yet; trying again: {Reason}")]
    public static partial void PeopleNotRecorded(ILogger logger, string reason);
}
