using System.Globalization;
using System.Text.Json;

namespace LabWatch.Intake.Payloads.Mapped;

/// <summary>A JSON Pointer (RFC 6901).</summary>
internal sealed class JsonPointer
{
    private readonly string[] _tokens;

    private JsonPointer(string text, string[] tokens)
    {
        Text = text;
        _tokens = tokens;
    }

    /// <summary>The pointer as written.</summary>
    public string Text { get; }

    /// <summary>Reads a pointer (RFC 6901 section 3): empty, or tokens that each begin with a slash; <c>~</c> only as <c>~0</c> or <c>~1</c>.</summary>
    public static bool TryParse(string text, out JsonPointer pointer)
    {
        pointer = new JsonPointer(string.Empty, []);
        if (text.Length == 0)
        {
            return true;
        }

        for (int i = text.IndexOf('~', StringComparison.Ordinal); i >= 0; i = text.IndexOf('~', i + 1))
        {
            if (i + 1 == text.Length || text[i + 1] is not ('0' or '1'))
            {
                return false;
            }
        }

        if (text[0] != '/')
        {
            return false;
        }

        // Section 4: ~1 first, then ~0, so that ~01 becomes ~1.
        pointer = new JsonPointer(text, [.. text[1..].Split('/').Select(token => token.Replace("~1", "/", StringComparison.Ordinal).Replace("~0", "~", StringComparison.Ordinal))]);
        return true;
    }

    /// <summary>The value that it points to (section 4); false where there is none.</summary>
    public bool TryEvaluate(JsonElement root, out JsonElement value)
    {
        value = root;
        foreach (string token in _tokens)
        {
            if (value.ValueKind == JsonValueKind.Object && value.TryGetProperty(token, out JsonElement member))
            {
                value = member;
            }
            else if (value.ValueKind == JsonValueKind.Array && TryIndex(token, value.GetArrayLength(), out int index))
            {
                value = value[index];
            }
            else
            {
                return false;
            }
        }

        return true;
    }

    // Digits without leading zeros; "-" names the element after the last, which does not exist.
    private static bool TryIndex(string token, int length, out int index)
    {
        index = 0;
        return token.Length is > 0 and <= 9
            && (token == "0" || token[0] != '0')
            && int.TryParse(token, NumberStyles.None, CultureInfo.InvariantCulture, out index)
            && index < length;
    }
}
