using LabWatch.Simulator.Faults;

namespace LabWatch.Service.Api.Demo;

/// <summary>What each kind of fault does, in words for a person.</summary>
internal static class FaultTexts
{
    /// <summary>One sentence.</summary>
    public static string Of(FaultKind kind) => kind switch
    {
        FaultKind.ThermometerDrift => "A well thermometer reads wrong by this much.",
        FaultKind.ThermometerStuck => "A well thermometer repeats its last value.",
        FaultKind.CoatingFall => "The emissivity of the cavity's coating falls by this much.",
        FaultKind.ComparatorDrift => "The check radiation thermometer reads wrong by this much.",
        FaultKind.PurgeLoss => "This share of the purge flow is lost.",
        FaultKind.Frost => "Frost lies in the cavity while it is below 0 °C; 1 is a closed layer.",
        FaultKind.HeaterRelayStuck => "The heater gives this share of its full power, whatever the controller wants.",
        FaultKind.InsulationDamage => "Heat leaks through the insulation: the outer case becomes hot.",
        FaultKind.OpenShutter => "The shutter stays open.",
        FaultKind.SensorSilent => "A channel sends nothing any more.",
        FaultKind.ClockSkew => "The device's clock is wrong by this much; positive is ahead.",
        _ => FaultCatalogue.Of(kind).Name,
    };
}
