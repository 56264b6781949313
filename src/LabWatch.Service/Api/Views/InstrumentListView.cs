using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>The instruments of the site.</summary>
internal sealed record InstrumentListView(
    [property: Description("The instruments, in the order of their recording.")] IReadOnlyList<InstrumentView> Items);
