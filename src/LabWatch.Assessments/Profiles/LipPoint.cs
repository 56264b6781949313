namespace LabWatch.Assessments.Profiles;

/// <summary>The aperture lip over a window.</summary>
/// <param name="Channel">Id of its channel.</param>
/// <param name="Celsius">Mean temperature.</param>
/// <param name="StandardUncertainty">Standard uncertainty, kelvin.</param>
/// <param name="IsCalibrated">Whether a certificate is in force for it.</param>
public sealed record LipPoint(string Channel, double Celsius, double StandardUncertainty, bool IsCalibrated);
