using System.Text;
using LabWatch.Intake.Units;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;

namespace LabWatch.Intake.Payloads;

/// <summary>What the decoders need of a channel, in the form in which it is met on the wire.</summary>
internal sealed class ChannelEntry(Channel channel, int index)
{
    private readonly double _minimum = channel.SensorMinimum ?? double.NegativeInfinity;
    private const int LongestUnit = 64;
    private volatile SentUnit? _lastUnit;
    private readonly double _maximum = channel.SensorMaximum ?? double.PositiveInfinity;

    /// <summary>The channel's id, the one string that all its readings share.</summary>
    public string Id { get; } = channel.Id;

    public byte[] IdUtf8 { get; } = Encoding.UTF8.GetBytes(channel.Id);

    public string Unit { get; } = channel.Unit;

    public byte[] UnitUtf8 { get; } = Encoding.UTF8.GetBytes(channel.Unit);

    /// <summary>Place of the channel in its source, where the search for the next name starts.</summary>
    public int Index { get; } = index;

    /// <summary>
    /// How a unit that a device sent becomes the channel's; the identity gives null and true. False with the code of the reason where it
    /// cannot. The last unit is remembered, as a device keeps to one.
    /// </summary>
    public bool TryFindConversion(ReadOnlySpan<byte> unit, out UnitConversion? conversion, out string? refusal)
    {
        conversion = null;
        refusal = null;
        if (unit.IsEmpty || unit.SequenceEqual(UnitUtf8))
        {
            return true;
        }

        if (_lastUnit is { } last && unit.SequenceEqual(last.Utf8))
        {
            conversion = last.Conversion;
            return true;
        }

        string name = Encoding.UTF8.GetString(unit[..Math.Min(unit.Length, LongestUnit)]);
        conversion = UnitTable.Find(name, Unit);
        if (conversion is null)
        {
            refusal = UnitTable.IsKnown(name) ? IntakeCode.UnitMismatch : IntakeCode.UnknownUnit;
            return false;
        }

        _lastUnit = new SentUnit(unit.ToArray(), conversion);
        return true;
    }

    /// <summary>The flag of a value outside what the sensor can give.</summary>
    public ReadingQuality JudgeRange(double value) =>
        value < _minimum || value > _maximum ? ReadingQuality.OutsideSensorRange : ReadingQuality.None;

    private sealed record SentUnit(byte[] Utf8, UnitConversion Conversion);
}
