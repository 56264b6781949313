namespace LabWatch.Benchmarks.Intake;

/// <summary>One of the two that are compared.</summary>
internal interface ISubscriber : IAsyncDisposable
{
    /// <summary>Messages that are done with: acknowledged.</summary>
    long Done { get; }

    /// <summary>Connects with the persistent session; returns once subscribed.</summary>
    Task StartAsync();

    /// <summary>Leaves; the broker keeps the session.</summary>
    Task StopAsync();
}
