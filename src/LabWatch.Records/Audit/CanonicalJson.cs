using System.Buffers;
using System.Text;
using System.Text.Json;
using System.Text.Json.Nodes;

namespace LabWatch.Records.Audit;

/// <summary>
/// The JSON Canonicalization Scheme (RFC 8785): one text for one content, so that a digest over it can be made again by anybody.
/// Members are sorted by UTF-16 code units, numbers are written as ECMAScript does, strings with the fewest escapes, without white space.
/// </summary>
public static class CanonicalJson
{
    /// <summary>The canonical form as UTF-8 bytes.</summary>
    /// <param name="content">Any JSON value; null is the literal null. Numbers must be finite IEEE 754 doubles; texts must be valid UTF-16.</param>
    /// <exception cref="ArgumentException">A number is not finite or a text holds half of a surrogate pair.</exception>
    public static byte[] Write(JsonNode? content)
    {
        ArrayBufferWriter<byte> output = new();
        WriteNode(output, content);
        return output.WrittenSpan.ToArray();
    }

    private static void WriteNode(ArrayBufferWriter<byte> output, JsonNode? node)
    {
        switch (node)
        {
            case null:
                output.Write("null"u8);
                break;
            case JsonObject members:
                WriteObject(output, members);
                break;
            case JsonArray items:
                WriteArray(output, items);
                break;
            default:
                WriteValue(output, node.AsValue());
                break;
        }
    }

    private static void WriteObject(ArrayBufferWriter<byte> output, JsonObject members)
    {
        output.Write("{"u8);
        bool isFirst = true;
        foreach ((string name, JsonNode? value) in members.OrderBy(member => member.Key, StringComparer.Ordinal))
        {
            Separate(output, ref isFirst);
            CanonicalUtf8.WriteText(output, name);
            output.Write(":"u8);
            WriteNode(output, value);
        }

        output.Write("}"u8);
    }

    private static void WriteArray(ArrayBufferWriter<byte> output, JsonArray items)
    {
        output.Write("["u8);
        bool isFirst = true;
        foreach (JsonNode? item in items)
        {
            Separate(output, ref isFirst);
            WriteNode(output, item);
        }

        output.Write("]"u8);
    }

    private static void WriteValue(ArrayBufferWriter<byte> output, JsonValue value)
    {
        switch (value.GetValueKind())
        {
            case JsonValueKind.True:
                output.Write("true"u8);
                break;
            case JsonValueKind.False:
                output.Write("false"u8);
                break;
            case JsonValueKind.Number:
                double number = value.TryGetValue(out double known) ? known : JsonSerializer.Deserialize<double>(value.ToJsonString());
                output.Write(Encoding.ASCII.GetBytes(CanonicalNumber.Write(number)));
                break;
            default:
                CanonicalUtf8.WriteText(output, value.GetValue<string>());
                break;
        }
    }

    private static void Separate(ArrayBufferWriter<byte> output, ref bool isFirst)
    {
        if (!isFirst)
        {
            output.Write(","u8);
        }

        isFirst = false;
    }
}
