using LabWatch.Lab.Identity;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.LabFile;

/// <summary>One entry of the member <c>sources</c> of a lab file.</summary>
internal static class SourceSection
{
    /// <summary>Lowest temperature that any part of the file may name: absolute zero, degree Celsius.</summary>
    public const double LowestCelsius = -273.15;

    /// <summary>Highest temperature that any part of the file may name, degree Celsius.</summary>
    public const double HighestCelsius = 4000;

    public static ReferenceSource Read(JsonCursor item, string site)
    {
        item.OnlyMembers("id", "name", "kind", "route", "range", "purgeGas", "bands", "cavity", "channels",
            "view", "baselines", "surroundings", "wellToWallDrop", "claimed", "conditions", "purge", "balances", "effectiveFrom", "hazards");
        SourceKey key = new(site, item.Id("id"));
        (double minimum, double maximum) = Range(item) ?? (double.NaN, double.NaN);
        return new ReferenceSource(
            key,
            item.Text("name"),
            item.Choice<SourceKind>("kind"),
            item.Choice<TraceabilityRoute>("route"),
            minimum,
            maximum,
            CavitySection.Read(item),
            [.. item.Items("bands").Select(Band)],
            [.. item.Items("channels").Select(channel => ChannelSection.Read(channel, key))])
        {
            PurgeGas = item.OptionalText("purgeGas"),
            View = RadianceSection.View(item),
            Baselines = [.. item.Items("baselines", required: false).Select(RadianceSection.Baseline)],
            Claimed = [.. item.Items("claimed", required: false).Select(Claimed)],
            SurroundingsOffsetKelvin = RadianceSection.Surroundings(item),
            WellToWallDrop = RadianceSection.Drop(item),
            Hazards = HazardSection.Read(item),
            Conditions = WatchSection.Conditions(item),
            Purge = WatchSection.Purge(item),
            Balances = [.. item.Items("balances", required: false).Select(WatchSection.Balance)],
            EffectiveFrom = item.OptionalTime("effectiveFrom") ?? Instant.MinValue,
        };
    }

    /// <summary>The member <c>range</c>: two temperatures, the first below the second.</summary>
    public static (double Minimum, double Maximum)? Range(JsonCursor item, bool required = true)
    {
        if (item.Object("range", required) is not { } range)
        {
            return null;
        }

        range.OnlyMembers("minimumCelsius", "maximumCelsius");
        double minimum = range.Number("minimumCelsius", LowestCelsius, HighestCelsius);
        double maximum = range.Number("maximumCelsius", LowestCelsius, HighestCelsius);
        if (minimum > maximum)
        {
            range.Report("empty-range", "The range ends below its start.", "Exchange the two temperatures or correct them.");
        }

        return (minimum, maximum);
    }

    private static ClaimedUncertainty Claimed(JsonCursor item)
    {
        item.OnlyMembers("contribution", "standardUncertaintyKelvin", "degreesOfFreedom", "shape", "from", "band", "range");
        (double Minimum, double Maximum)? range = Range(item, required: false);
        return new ClaimedUncertainty(
            item.Id("contribution"),
            item.Number("standardUncertaintyKelvin", 0, 1000),
            item.OptionalNumber("degreesOfFreedom", 1, 1e9) ?? double.PositiveInfinity,
            item.OptionalText("shape") is null ? DistributionShape.Normal : item.Choice<DistributionShape>("shape"),
            item.Text("from"))
        {
            Band = item.OptionalText("band"),
            MinimumCelsius = range?.Minimum,
            MaximumCelsius = range?.Maximum,
        };
    }

    private static WorkingBand Band(JsonCursor item)
    {
        item.OnlyMembers("id", "name", "wavelengthMicrometre", "lowerMicrometre", "upperMicrometre");
        double? wavelength = item.OptionalNumber("wavelengthMicrometre", 0.1, 1000);
        double lower = wavelength ?? item.Number("lowerMicrometre", 0.1, 1000);
        double upper = wavelength ?? item.Number("upperMicrometre", 0.1, 1000);
        if (lower > upper)
        {
            item.Report("empty-range", "The band ends below its start.", "Exchange the two wavelengths or correct them.");
        }

        return new WorkingBand(item.Id("id"), item.Text("name"), lower, upper);
    }
}
