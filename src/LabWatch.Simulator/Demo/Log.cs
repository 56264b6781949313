using LabWatch.Lab.Time;
using Microsoft.Extensions.Logging;

namespace LabWatch.Simulator.Demo;

internal static partial class Log
{
    [LoggerMessage(6000, LogLevel.Information, "{ClientId} publishes to {Host}:{Port}")]
    public static partial void Connected(ILogger logger, string clientId, string host, int port);

    [LoggerMessage(6001, LogLevel.Warning, "{ClientId} has no broker ({Reason}); tries again in {Pause}, from what was acknowledged")]
    public static partial void BrokerLost(ILogger logger, string clientId, string reason, TimeSpan pause);

    [LoggerMessage(6002, LogLevel.Information, "Filling history from {From} to {To}")]
    public static partial void HistoryStarted(ILogger logger, Instant from, Instant to);

    [LoggerMessage(6003, LogLevel.Information, "History from {From} to {To} is filled")]
    public static partial void HistoryFilled(ILogger logger, Instant from, Instant to);

    [LoggerMessage(6005, LogLevel.Error, "{ClientId} failed; tries again in {Pause}, from what was acknowledged")]
    public static partial void SessionFailed(ILogger logger, string clientId, TimeSpan pause, Exception error);

    [LoggerMessage(6004, LogLevel.Warning, "The data directory holds a demo with seed {Seed}; it goes on, other options have no effect")]
    public static partial void OptionsIgnored(ILogger logger, long seed);
}
