using System.Text;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;

namespace LabWatch.Intake.Payloads;

/// <summary>What the decoders need of a channel, in the form in which it is met on the wire.</summary>
internal sealed class ChannelEntry(Channel channel, int index)
{
    private readonly double _minimum = channel.SensorMinimum ?? double.NegativeInfinity;
    private readonly double _maximum = channel.SensorMaximum ?? double.PositiveInfinity;

    /// <summary>The channel's id, the one string that all its readings share.</summary>
    public string Id { get; } = channel.Id;

    public byte[] IdUtf8 { get; } = Encoding.UTF8.GetBytes(channel.Id);

    public string Unit { get; } = channel.Unit;

    public byte[] UnitUtf8 { get; } = Encoding.UTF8.GetBytes(channel.Unit);

    /// <summary>Place of the channel in its source, where the search for the next name starts.</summary>
    public int Index { get; } = index;

    /// <summary>The flag of a value outside what the sensor can give.</summary>
    public ReadingQuality JudgeRange(double value) =>
        value < _minimum || value > _maximum ? ReadingQuality.OutsideSensorRange : ReadingQuality.None;
}
