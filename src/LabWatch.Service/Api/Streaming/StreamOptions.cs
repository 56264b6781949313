namespace LabWatch.Service.Api.Streaming;

/// <summary>Pace of the stream. It is meant for people, so it keeps real time even where the laboratory's clock runs faster.</summary>
internal sealed record StreamOptions
{
    /// <summary>Clock of the pace.</summary>
    public TimeProvider Clock { get; init; } = TimeProvider.System;

    /// <summary>Time between two looks for changes.</summary>
    public TimeSpan LookEvery { get; init; } = TimeSpan.FromSeconds(1);

    /// <summary>Time between two signs of life where nothing changes.</summary>
    public TimeSpan Heartbeat { get; init; } = TimeSpan.FromSeconds(5);

    /// <summary>Time between two looks whether the listener is still signed in.</summary>
    public TimeSpan CallerCheck { get; init; } = TimeSpan.FromSeconds(5);

    /// <summary>Sources whose status is sent at every look; with more, each is sent less often, so that the stream stays small.</summary>
    public int SourcesAtOnce { get; init; } = 20;
}
