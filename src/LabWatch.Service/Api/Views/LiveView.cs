using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>The process answers.</summary>
internal sealed record LiveView(
    [property: Description("Always live.")] string Status,
    [property: Description("Version of the program.")] string Version);
