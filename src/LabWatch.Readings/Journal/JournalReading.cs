using LabWatch.Lab.Readings;

namespace LabWatch.Readings.Journal;

/// <summary>One reading of a journal row: ids as in the catalogue tables.</summary>
internal readonly record struct JournalReading(int Source, int Channel, long Time, double Value, ReadingQuality Quality);
