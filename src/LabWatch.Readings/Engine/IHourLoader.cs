using LabWatch.Readings.Head;

namespace LabWatch.Readings.Engine;

/// <summary>Tells an hour in memory what the database has of it, so that identities are known. Throws what the database throws.</summary>
internal interface IHourLoader
{
    void Load(HeadHour hour);
}
