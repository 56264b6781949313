using System.ComponentModel;

namespace LabWatch.Service.Api.Views;

/// <summary>A reference source: what it is, and what is known about it now.</summary>
internal sealed record SourceView(
    [property: Description("Key of the source, site.source.")] string Id,
    [property: Description("Id of the site.")] string Site,
    [property: Description("Id of the source in its site.")] string Source,
    [property: Description("Name for people.")] string Name,
    [property: Description("What it is built as.")] string Kind,
    [property: Description("How its radiance is traceable: contact or radiometric.")] string Route,
    [property: Description("Lowest set point it is used at, degree Celsius.")] double MinimumCelsius,
    [property: Description("Highest set point it is used at, degree Celsius.")] double MaximumCelsius,
    [property: Description("Gas that it is purged with; null where it is not purged.")] string? PurgeGas,
    [property: Description("Geometry of the cavity.")] CavityView Cavity,
    [property: Description("How it is looked at; its effective emissivity holds for this view.")] ApertureViewView View,
    [property: Description("Spectral bands it is used in.")] IReadOnlyList<BandView> Bands,
    [property: Description("Its streams of readings.")] IReadOnlyList<ChannelView> Channels,
    [property: Description("What is known about it now.")] SourceStatusView Status);
