namespace LabWatch.Alerts.Hazards;

/// <summary>What a check makes of the latest readings. Neither present nor absent (inside the dead-band, or not known) changes nothing.</summary>
/// <param name="Cause">What it would be.</param>
/// <param name="Present">Whether the condition is there.</param>
/// <param name="Absent">Whether it is gone by the dead-band.</param>
/// <param name="Value">What was found.</param>
/// <param name="Limit">What it is compared with.</param>
/// <param name="Unit">Unit of both.</param>
/// <param name="Besides">Another number that the message needs; NaN where none.</param>
internal readonly record struct HazardVerdict(
    HazardCause Cause, bool Present, bool Absent, double Value = double.NaN, double Limit = double.NaN, string Unit = "", double Besides = double.NaN);
