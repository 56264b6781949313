using LabWatch.Lab.Time;

namespace LabWatch.Simulator;

/// <summary>One value as the simulated device sends it.</summary>
/// <param name="Channel">Id of the channel.</param>
/// <param name="DeviceTime">Time by the device's clock.</param>
/// <param name="Value">Raw value.</param>
/// <param name="Unit">Unit, SenML name.</param>
public readonly record struct SimulatedReading(string Channel, Instant DeviceTime, double Value, string Unit);
