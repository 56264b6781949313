using LabWatch.Lab.Readings;

namespace LabWatch.Readings.Influx;

/// <summary>A line to be written, with the reading it comes from.</summary>
/// <param name="Pack">The pack of the reading; null for a point that is not a reading.</param>
/// <param name="Reading">The reading.</param>
/// <param name="Line">The line.</param>
internal readonly record struct InfluxPoint(ReadingPack? Pack, Reading Reading, string Line);
