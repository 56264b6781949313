using LabWatch.Lab.Sources;

namespace LabWatch.Lab.LabFile;

/// <summary>The member <c>hazards</c> of a source.</summary>
internal static class HazardSection
{
    private const double LargestPower = 1e6;
    private const double LargestFlow = 1000;

    public static HazardLimits Read(JsonCursor source)
    {
        if (source.Object("hazards", required: false) is not { } item)
        {
            return HazardLimits.None;
        }

        item.OnlyMembers(
            "overTemperatureCelsius", "purgeMinimumLitrePerMinute", "purgeHotAboveCelsius", "condensationMarginKelvin", "coolingMinimumLitrePerMinute",
            "oxygenMinimumPercent", "bathLevelMinimumPercent", "stirrerMinimumPerMinute", "flashPointCelsius", "heatCapacityJoulePerKelvin",
            "lossWattPerKelvin", "unattendedAboveCelsius", "unattendedMinutes");
        HazardLimits limits = new()
        {
            OverTemperatureCelsius = Celsius(item, "overTemperatureCelsius"),
            PurgeMinimumLitrePerMinute = item.OptionalNumber("purgeMinimumLitrePerMinute", 0.001, LargestFlow),
            PurgeHotAboveCelsius = Celsius(item, "purgeHotAboveCelsius"),
            CondensationMarginKelvin = item.OptionalNumber("condensationMarginKelvin", 0, 50),
            CoolingMinimumLitrePerMinute = item.OptionalNumber("coolingMinimumLitrePerMinute", 0.001, LargestFlow),
            OxygenMinimumPercent = item.OptionalNumber("oxygenMinimumPercent", 15, 20.9),
            BathLevelMinimumPercent = item.OptionalNumber("bathLevelMinimumPercent", 0, 100),
            StirrerMinimumPerMinute = item.OptionalNumber("stirrerMinimumPerMinute", 1, 100_000),
            FlashPointCelsius = Celsius(item, "flashPointCelsius"),
            HeatCapacityJoulePerKelvin = item.OptionalNumber("heatCapacityJoulePerKelvin", 1, 1e8),
            LossWattPerKelvin = item.OptionalNumber("lossWattPerKelvin", 1e-4, LargestPower),
            UnattendedAboveCelsius = Celsius(item, "unattendedAboveCelsius"),
            UnattendedMinutes = item.OptionalNumber("unattendedMinutes", 1, 10_080),
        };
        if (limits.HeatCapacityJoulePerKelvin is null != limits.LossWattPerKelvin is null)
        {
            item.Report("incomplete", "An energy balance needs the heat capacity and the loss.", "Give heatCapacityJoulePerKelvin and lossWattPerKelvin, or neither.");
        }

        return limits;
    }

    private static double? Celsius(JsonCursor item, string name) => item.OptionalNumber(name, SourceSection.LowestCelsius, SourceSection.HighestCelsius);
}
