using LabWatch.Alerts.LifeCycle;
using LabWatch.Metrology.Hazards;

namespace LabWatch.Alerts.Hazards;

/// <summary>
/// Water or frost in the cavity: the dew or frost point of the gas at the aperture comes closer than a margin to the coldest wall, lip included.
/// Without a sensor there the room's air counts, unless a qualified flow of purge gas is confirmed.
/// </summary>
internal sealed class CondensationCheck(AlertKey key, CondensationInputs inputs, double margin)
    : HazardCheck(key, inputs.Subject, inputs.All, TimeSpan.FromSeconds(30))
{
    /// <summary>Back by this much before it counts as gone, kelvin.</summary>
    private const double DeadBandKelvin = 1;

    /// <inheritdoc/>
    public override HazardVerdict Judge(long now)
    {
        double coldest = double.NaN;
        foreach (HazardChannel wall in inputs.Walls)
        {
            double value = wall.State.LastValue;
            coldest = !(coldest <= value) && !double.IsNaN(value) ? value : coldest;
        }

        HazardCause cause = inputs.DewPoint is null ? HazardCause.RoomCondensation : HazardCause.Condensation;
        double moist = inputs.DewPoint?.State.LastValue ?? OfRoom();
        bool purged = inputs.DewPoint is null && inputs.PurgeFlow?.State.LastValue >= inputs.QualifiedFlow;
        bool close = moist > coldest - margin;
        bool far = moist < coldest - margin - DeadBandKelvin;
        return new HazardVerdict(cause, close && !purged, far || purged, moist, coldest, "Cel", margin);
    }

    private double OfRoom()
    {
        double celsius = inputs.Ambient?.State.LastValue ?? double.NaN;
        double humidity = inputs.Humidity?.State.LastValue ?? double.NaN;
        return humidity is > 0 and <= 100 && celsius is > -40 and < 60 ? Humidity.CondensationPoint(celsius, humidity) : double.NaN;
    }
}
