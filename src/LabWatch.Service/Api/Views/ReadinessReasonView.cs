using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>One reason for a readiness.</summary>
internal sealed record ReadinessReasonView(
    [property: Description("Stable machine name.")] string Code,
    [property: Description("The reason in plain words with numbers and units.")] string Text,
    [property: Description("Whether it stands against ready; the others inform.")] bool Blocks,
    [property: Description("Whether it goes away by waiting, as far as is known.")] bool PassesByWaiting);
