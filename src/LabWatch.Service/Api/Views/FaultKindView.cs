using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>A kind of fault that the demo can inject.</summary>
internal sealed record FaultKindView(
    [property: Description("Code of the kind.")] string Kind,
    [property: Description("What happens, in words.")] string Description,
    [property: Description("Unit of its size; 1 for a plain number.")] string Unit,
    [property: Description("Smallest size, in unit.")] double Minimum,
    [property: Description("Largest size, in unit.")] double Maximum,
    [property: Description("Size where none is given, in unit.")] double DefaultSize,
    [property: Description("Whether a channel must be named.")] bool NeedsChannel);
