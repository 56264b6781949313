using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Alerts;

/// <summary>An invented site with one or more block furnaces, each with a metal case, a ceramic lip and a well.</summary>
internal static class TestSite
{
    public const string Site = "hollin-vale";

    public static readonly SourceKey Rowan = new(Site, "rowan");
    public static readonly SourceKey Yew = new(Site, "yew");
    public static readonly Instant Start = Parse("2026-12-01T08:00:00Z");

    public static Instant Parse(string text) => Instant.TryParse(text, out Instant instant) ? instant : throw new ArgumentException(text);

    public static Channel Surface(SourceKey source, string id = "case", SurfaceContact? contact = null, string unit = "Cel", double seconds = 1) =>
        new(new ChannelKey(source, id), "Outer case, front", ChannelQuantity.OuterSurface, unit, TimeSpan.FromSeconds(seconds))
        {
            Contact = contact ?? new SurfaceContact(SurfaceMaterial.UncoatedMetal, TimeSpan.FromMinutes(10), null),
            SensorMinimum = unit == "Cel" ? -50 : null,
            SensorMaximum = unit == "Cel" ? 400 : null,
            IsHazardChannel = true,
        };

    public static Channel Well(SourceKey source) =>
        new(new ChannelKey(source, "well-1"), "Bottom well", ChannelQuantity.WellThermometer, "Ohm", TimeSpan.FromSeconds(1)) { IsReference = true };

    public static ReferenceSource Source(SourceKey key, params Channel[] channels) => new(
        key, key.Source == "rowan" ? "Rowan furnace" : "Source " + key.Source, SourceKind.BlockFurnace, TraceabilityRoute.Contact, 100, 500,
        new Cavity(CavityShape.Cylinder, 25, 150, null, 25, []), [], channels);

    public static LabSnapshot Lab(params ReferenceSource[] sources) => Lab([], [], [], sources);

    public static LabSnapshot Lab(
        IReadOnlyList<Notifier> notifiers, IReadOnlyList<Installation> installations, IReadOnlyList<Certificate> certificates, params ReferenceSource[] sources) =>
        new(new LabSite(Site, "Hollin Vale", "UTC"), sources, [], installations, certificates, [.. sources.Select(source => Limit(source.Key, CriterionCode.Stability, "K"))], notifiers);

    public static AcceptanceLimit Limit(SourceKey source, string criterion, string unit, string? band = null) =>
        new($"{source.Source}-{criterion}", 1, source, criterion, 0.2, unit, DecisionRule.SimpleAcceptance, Start - TimeSpan.FromDays(100)) { Band = band };

    public static LabSnapshot OneSurface(SurfaceContact? contact = null) => Lab(Source(Rowan, Surface(Rowan, contact: contact), Well(Rowan)));
}
