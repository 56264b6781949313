namespace LabWatch.Readings.Influx;

/// <summary>The server refuses some of the points that a request holds, whenever they are sent.</summary>
internal sealed class InfluxRefusedException(string message, Exception cause) : Exception(message, cause);
