using System.ComponentModel;

namespace LabWatch.Service.Api.Notifying;

/// <summary>How a test message ended.</summary>
internal sealed record TestView(
    [property: Description("Whether the receiver has taken it. Whether a person sees it only that person can say.")] bool IsTaken,
    [property: Description("What went wrong; null where nothing.")] string? Error);
