namespace LabWatch.Lab.Sources;

/// <summary>What the laboratory has laid down for the hazard watch of one source; null where the usual value of the watch applies or nothing is known.</summary>
public sealed record HazardLimits
{
    /// <summary>Nothing laid down.</summary>
    public static HazardLimits None { get; } = new();

    /// <summary>Temperature that no thermometer of the source may reach, degree Celsius.</summary>
    public double? OverTemperatureCelsius { get; init; }

    /// <summary>Least flow of purge gas while hot, litre per minute.</summary>
    public double? PurgeMinimumLitrePerMinute { get; init; }

    /// <summary>Temperature from which on the cavity must not be without purge gas, degree Celsius.</summary>
    public double? PurgeHotAboveCelsius { get; init; }

    /// <summary>How far the dew or frost point must stay below the coldest wall, kelvin.</summary>
    public double? CondensationMarginKelvin { get; init; }

    /// <summary>Least flow of cooling water while heated or hot, litre per minute.</summary>
    public double? CoolingMinimumLitrePerMinute { get; init; }

    /// <summary>Least volume fraction of oxygen in the room, percent.</summary>
    public double? OxygenMinimumPercent { get; init; }

    /// <summary>Least level of the bath fluid, percent of full.</summary>
    public double? BathLevelMinimumPercent { get; init; }

    /// <summary>Least speed of the stirrer while heated or hot, revolutions per minute.</summary>
    public double? StirrerMinimumPerMinute { get; init; }

    /// <summary>Flash point of the bath fluid, from its safety data sheet, degree Celsius.</summary>
    public double? FlashPointCelsius { get; init; }

    /// <summary>Heat capacity of what the heater heats, joule per kelvin: from a step of power.</summary>
    public double? HeatCapacityJoulePerKelvin { get; init; }

    /// <summary>Power that holds the source one kelvin above the room, watt per kelvin: from the settled source.</summary>
    public double? LossWattPerKelvin { get; init; }

    /// <summary>Temperature from which on the source needs somebody who looks after it, degree Celsius.</summary>
    public double? UnattendedAboveCelsius { get; init; }

    /// <summary>How long it may be that hot without a run, a planned soak or anybody's attention, minutes.</summary>
    public double? UnattendedMinutes { get; init; }
}
