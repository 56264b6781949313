using System.Formats.Cbor;

namespace LabWatch.Tests.Intake;

/// <summary>Packs of SenML in CBOR.</summary>
internal static class CborPack
{
    /// <summary>The example of RFC 8428 section 6 (quoted from memory): the pack of section 5.1.2 with relative times.</summary>
    public static byte[] Rfc8428Section6 { get; } = Convert.FromHexString(
        "87a721781b75726e3a6465763a6f773a3130653230373361303130383030363a"
        + "22fb41d303a15b00106223614120050067766f6c7461676501615602fb405e066666666666"
        + "a3006763757272656e74062402fb3ff3333333333333"
        + "a3006763757272656e74062302fb3ff4cccccccccccd"
        + "a3006763757272656e74062202fb3ff6666666666666"
        + "a3006763757272656e74062102f93e00"
        + "a3006763757272656e74062002fb3ff999999999999a"
        + "a3006763757272656e74060002fb3ffb333333333333");

    /// <summary>A pack of readings at whole seconds.</summary>
    public static byte[] Of(params (string Name, double Value, long Second)[] readings)
    {
        CborWriter writer = new();
        writer.WriteStartArray(readings.Length);
        foreach ((string name, double value, long second) in readings)
        {
            writer.WriteStartMap(3);
            writer.WriteInt32(0);
            writer.WriteTextString(name);
            writer.WriteInt32(2);
            writer.WriteDouble(value);
            writer.WriteInt32(6);
            writer.WriteInt64(second);
            writer.WriteEndMap();
        }

        writer.WriteEndArray();
        return writer.Encode();
    }

    /// <summary>One record of <c>well-1</c> at the arrival, its value written by the caller.</summary>
    public static byte[] WithValue(Action<CborWriter> value)
    {
        CborWriter writer = new();
        writer.WriteStartArray(1);
        writer.WriteStartMap(2);
        writer.WriteInt32(0);
        writer.WriteTextString("well-1");
        writer.WriteInt32(2);
        value(writer);
        writer.WriteEndMap();
        writer.WriteEndArray();
        return writer.Encode();
    }
}
