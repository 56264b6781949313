using System.Globalization;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Readings;

namespace LabWatch.Readings.Influx;

/// <summary>
/// What the store writes, in line protocol. Measurements: <c>reading</c> (one point a reading), <c>hour</c> (one point an hour of a source:
/// how many readings, last change, whether something is not sealed), <c>seal</c> (one point a sealing), <c>writer</c> (who writes).
/// </summary>
internal static class InfluxLines
{
    /// <summary>Earliest and latest time that the server can store, in microseconds.</summary>
    public const long FirstTime = long.MinValue / 1000 + 1_000_000;

    /// <inheritdoc cref="FirstTime"/>
    public const long LastTime = long.MaxValue / 1000 - 1_000_000;

    /// <summary>Measurement and tags of a channel.</summary>
    public static string Channel(SourceKey source, string channel) => $"reading,channel={Tag(channel)},{Source(source)}";

    /// <summary>Whether the server can hold a reading at all.</summary>
    public static bool CanHold(in Reading reading) =>
        reading.Time.Microseconds is >= FirstTime and <= LastTime && !double.IsInfinity(reading.Value)
        && reading.Channel.Length > 0 && !reading.Channel.Any(one => char.IsControl(one) || one == '\\');

    /// <summary>A reading. The shortest text that gives the very bits of the value; none where there is no value.</summary>
    public static string Reading(string channel, long time, double value, ReadingQuality quality)
    {
        string number = double.IsNaN(value) ? string.Empty : string.Create(CultureInfo.InvariantCulture, $"v={value:R}");
        string note = quality == ReadingQuality.None && number.Length > 0 ? string.Empty : string.Create(CultureInfo.InvariantCulture, $"{(number.Length > 0 ? "," : string.Empty)}q={(int)quality}i");
        return string.Create(CultureInfo.InvariantCulture, $"{channel} {number}{note} {time}");
    }

    /// <summary>State of an hour.</summary>
    public static string Hour(SourceKey source, long hour, long readings, long change, long sealedReadings) => string.Create(
        CultureInfo.InvariantCulture,
        $"hour,{Source(source)} readings={readings}i,change={change}i,sealed={sealedReadings}i,open={(readings > sealedReadings ? 1 : 0)}i {hour}");

    /// <summary>A sealing.</summary>
    public static string Seal(SealedHour seal) => string.Create(
        CultureInfo.InvariantCulture,
        $"seal,{Source(seal.Source)} number={seal.Seal}i,hour={seal.Hour.Microseconds}i,part={seal.Part}i,readings={seal.Readings}i,change={seal.LastChange}i,sealed_at={seal.SealedAt.Microseconds}i,digest=\"{Convert.ToHexStringLower(seal.Digest.Span)}\" {seal.Hour.Microseconds + seal.Part}");

    /// <summary>Who writes, and when it last said so (Unix seconds; 0: nobody any more).</summary>
    public static string Writer(string owner, long seconds) => string.Create(CultureInfo.InvariantCulture, $"writer owner=\"{owner}\",at={seconds}i 0");

    private static string Source(SourceKey source) => $"site={Tag(source.Site)},source={Tag(source.Source)}";

    private static string Tag(string text) => text.Replace(",", "\\,", StringComparison.Ordinal).Replace("=", "\\=", StringComparison.Ordinal).Replace(" ", "\\ ", StringComparison.Ordinal);
}
