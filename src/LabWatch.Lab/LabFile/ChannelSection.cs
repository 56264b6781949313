using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;
using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.LabFile;

/// <summary>One entry of the member <c>channels</c> of a source.</summary>
internal static class ChannelSection
{
    public static Channel Read(JsonCursor item, SourceKey source)
    {
        item.OnlyMembers(
            "id", "name", "quantity", "unit", "intervalSeconds", "axialPositionMillimetre", "sensorMinimum", "sensorMaximum", "band", "contact", "hazard", "reference",
            "referenceJunction");
        ChannelQuantity quantity = item.Choice<ChannelQuantity>("quantity");
        string unit = item.Text("unit");
        IReadOnlyList<string> permitted = ChannelUnits.Of(quantity);
        if (unit.Length > 0 && !permitted.Contains(unit, StringComparer.Ordinal))
        {
            item.Report("unit-not-permitted", $"A {JsonCursor.ChoiceName(quantity)} channel is not read in this unit.", $"Use one of: {string.Join(", ", permitted)}.", "unit");
        }

        double interval = item.Number("intervalSeconds", 0.001, 86_400);
        double? minimum = item.OptionalNumber("sensorMinimum", double.MinValue, double.MaxValue);
        double? maximum = item.OptionalNumber("sensorMaximum", double.MinValue, double.MaxValue);
        if (minimum >= maximum)
        {
            item.Report("empty-range", "The sensor's range is empty.", "Give a maximum above the minimum.", "sensorMaximum");
        }

        SurfaceContact? contact = Contact(item);
        return new Channel(
            new ChannelKey(source, item.Id("id")), item.Text("name"), quantity, unit, TimeSpan.FromSeconds(double.IsFinite(interval) ? Math.Clamp(interval, 0.001, 86_400) : 1))
        {
            AxialPositionMillimetre = item.OptionalNumber("axialPositionMillimetre", 0, 10_000),
            SensorMinimum = minimum,
            SensorMaximum = maximum,
            Band = item.OptionalText("band"),
            ReferenceJunction = Junction(item, unit),
            Contact = contact,
            IsHazardChannel = contact is not null || item.Flag("hazard"),
            IsReference = item.Flag("reference"),
        };
    }

    private static ReferenceJunction? Junction(JsonCursor item, string unit)
    {
        if (item.Object("referenceJunction", required: false) is not { } junction)
        {
            return null;
        }

        junction.OnlyMembers("channel", "celsius", "standardUncertaintyKelvin");
        string? channel = junction.OptionalText("channel");
        double? celsius = junction.OptionalNumber("celsius", -50, 200, required: channel is null);
        double u = junction.OptionalNumber("standardUncertaintyKelvin", 0, 100, required: channel is null) ?? 0;
        if (channel is not null && celsius is not null)
        {
            junction.Report("contradiction", "The reference junctions are measured and kept at once.", "Give either the channel or the temperature.", "celsius");
        }

        if (unit.Length > 0 && !string.Equals(unit, "mV", StringComparison.Ordinal))
        {
            item.Report("not-a-thermocouple", "Only a channel read in mV has reference junctions.", "Remove \"referenceJunction\" or correct the unit.", "referenceJunction");
        }

        return new ReferenceJunction(channel, new Estimate(channel is null ? celsius ?? double.NaN : 0, u));
    }

    private static SurfaceContact? Contact(JsonCursor item)
    {
        if (item.Object("contact", required: false) is not { } contact)
        {
            return null;
        }

        contact.OnlyMembers("material", "contactSeconds", "limitCelsius", "coldLimitCelsius");
        double? seconds = contact.OptionalNumber("contactSeconds", 0.5, 86_400);
        return new SurfaceContact(
            contact.Choice<SurfaceMaterial>("material"),
            seconds is { } known && double.IsFinite(known) ? TimeSpan.FromSeconds(Math.Clamp(known, 0.5, 86_400)) : null,
            contact.OptionalNumber("limitCelsius", 20, 200))
        {
            ColdLimitCelsius = contact.OptionalNumber("coldLimitCelsius", -100, 20),
        };
    }
}
