namespace LabWatch.Readings.Blocks;

/// <summary>Stored bytes do not have the documented form: wrong check sum, version, length or content.</summary>
internal sealed class DamagedDataException(string message) : Exception(message);
