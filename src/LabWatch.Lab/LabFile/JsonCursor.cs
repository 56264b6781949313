using System.Text.Json;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.LabFile;

/// <summary>
/// A place in a JSON document that knows its JSON Pointer and collects findings instead of stopping at the first: every reader gives
/// a usable value back, so that one pass lists all that is wrong.
/// </summary>
internal readonly struct JsonCursor
{
    private readonly JsonElement _element;
    private readonly List<Finding> _findings;

    public JsonCursor(JsonElement element, string pointer, List<Finding> findings)
    {
        _element = element;
        Pointer = pointer;
        _findings = findings;
    }

    /// <summary>JSON Pointer of this place (RFC 6901).</summary>
    public string Pointer { get; }

    /// <summary>Adds a finding about this place or a member of it.</summary>
    public void Report(string code, string message, string cure, string? member = null)
    {
        JsonElement found = _element;
        bool present = member is null || (_element.ValueKind == JsonValueKind.Object && _element.TryGetProperty(member, out found));
        _findings.Add(new Finding(code, At(member), message, present ? Quote(found) : null, cure));
    }

    /// <summary>The named member as an object; null with a finding where it is required and missing, or of another type.</summary>
    public JsonCursor? Object(string name, bool required = true) => Child(name, JsonValueKind.Object, "an object", required);

    /// <summary>The items of the named array; empty with a finding where it is required and missing, empty, or of another type.</summary>
    public IReadOnlyList<JsonCursor> Items(string name, bool required = true)
    {
        if (Child(name, JsonValueKind.Array, "an array", required) is not { } array)
        {
            return [];
        }

        List<JsonCursor> items = [];
        foreach (JsonElement item in array._element.EnumerateArray())
        {
            JsonCursor cursor = new(item, $"{array.Pointer}/{items.Count}", _findings);
            if (item.ValueKind != JsonValueKind.Object)
            {
                cursor.Report("wrong-type", "An object belongs here.", "Write an object in braces.");
            }

            items.Add(cursor);
        }

        if (required && items.Count == 0)
        {
            array.Report("empty", "At least one entry is needed.", "Add an entry.");
        }

        return [.. items.Where(item => item._element.ValueKind == JsonValueKind.Object)];
    }

    /// <summary>The named text, not blank, at most 200 characters.</summary>
    public string Text(string name) => OptionalText(name, required: true) ?? string.Empty;

    /// <summary>The named text; null where it is missing.</summary>
    public string? OptionalText(string name, bool required = false)
    {
        if (Child(name, JsonValueKind.String, "a text", required) is not { } child)
        {
            return null;
        }

        string text = child._element.GetString()!;
        if (string.IsNullOrWhiteSpace(text) || text.Length > Finding.MaximumQuotedLength)
        {
            child.Report("bad-text", "The text is blank or longer than 200 characters.", "Write 1 to 200 characters.");
        }

        return text;
    }

    /// <summary>The named id.</summary>
    public string Id(string name)
    {
        string text = Text(name);
        if (text.Length > 0 && !Slug.IsValid(text))
        {
            Report("bad-id", "This is not an id.", "Use 1 to 63 small letters, digits and hyphens, not starting with a hyphen.", name);
        }

        return text;
    }

    /// <summary>The named finite number inside inclusive bounds; NaN with a finding where it is missing or wrong.</summary>
    public double Number(string name, double minimum, double maximum) => OptionalNumber(name, minimum, maximum, required: true) ?? double.NaN;

    /// <summary>The named finite number inside inclusive bounds; null where it is missing.</summary>
    public double? OptionalNumber(string name, double minimum, double maximum, bool required = false)
    {
        if (Child(name, JsonValueKind.Number, "a number", required) is not { } child)
        {
            return null;
        }

        if (!child._element.TryGetDouble(out double value) || !double.IsFinite(value) || value < minimum || value > maximum)
        {
            child.Report(
                "out-of-range",
                FormattableString.Invariant($"The number is not between {minimum} and {maximum}."),
                "Correct the number; mind the unit in the member's name.");
        }

        return value;
    }

    /// <summary>The named array of finite numbers inside inclusive bounds; empty where it is missing.</summary>
    public double[] Numbers(string name, double minimum, double maximum, bool required = true)
    {
        if (Child(name, JsonValueKind.Array, "an array", required) is not { } array)
        {
            return [];
        }

        List<double> numbers = [];
        foreach (JsonElement item in array._element.EnumerateArray())
        {
            JsonCursor cursor = new(item, $"{array.Pointer}/{numbers.Count}", _findings);
            double value = double.NaN;
            bool isGood = item.ValueKind == JsonValueKind.Number && item.TryGetDouble(out value) && value >= minimum && value <= maximum;
            if (!isGood)
            {
                cursor.Report("out-of-range", FormattableString.Invariant($"This is no number between {minimum} and {maximum}."), "Correct it.");
            }

            numbers.Add(value);
        }

        if (required && numbers.Count == 0)
        {
            array.Report("empty", "At least one number is needed.", "Add a number.");
        }

        return [.. numbers];
    }

    /// <summary>The named positive whole number.</summary>
    public int PositiveInteger(string name)
    {
        double value = Number(name, 1, int.MaxValue);
        if (double.IsFinite(value) && value != Math.Floor(value))
        {
            Report("not-whole", "A whole number belongs here.", "Write 1, 2, 3 and so on.", name);
        }

        return double.IsFinite(value) ? (int)Math.Clamp(value, 1, int.MaxValue) : 1;
    }

    /// <summary>The named truth value; false where it is missing.</summary>
    public bool Flag(string name)
    {
        if (!_element.TryGetProperty(name, out JsonElement found))
        {
            return false;
        }

        if (found.ValueKind is not (JsonValueKind.True or JsonValueKind.False))
        {
            Report("wrong-type", "True or false belongs here.", "Write true or false without quotes.", name);
        }

        return found.ValueKind == JsonValueKind.True;
    }

    /// <summary>The named time.</summary>
    public Instant Time(string name) => OptionalTime(name, required: true) ?? default;

    /// <summary>The named time; null where it is missing.</summary>
    public Instant? OptionalTime(string name, bool required = false)
    {
        if (Child(name, JsonValueKind.String, "a time", required) is not { } child)
        {
            return null;
        }

        if (!Instant.TryParse(child._element.GetString(), out Instant instant))
        {
            child.Report("bad-time", "This is not a time with an offset.", "Write RFC 3339, for example 2026-03-02T00:00:00Z.");
        }

        return instant;
    }

    /// <summary>The named choice among the members of an enumeration, written in small letters with hyphens.</summary>
    public T Choice<T>(string name)
        where T : struct, Enum
    {
        string text = Text(name);
        foreach (T value in Enum.GetValues<T>())
        {
            if (string.Equals(ChoiceName(value), text, StringComparison.Ordinal))
            {
                return value;
            }
        }

        if (text.Length > 0)
        {
            string permitted = string.Join(", ", Enum.GetValues<T>().Select(ChoiceName));
            Report("unknown-choice", "This choice is not known.", $"Use one of: {permitted}.", name);
        }

        return default;
    }

    /// <summary>The named value with its standard uncertainty.</summary>
    public Estimate Estimate(string name, double minimum, double maximum)
    {
        if (Object(name) is not { } estimate)
        {
            return Metrology.Uncertainty.Estimate.None;
        }

        estimate.OnlyMembers("value", "standardUncertainty");
        return new Estimate(estimate.Number("value", minimum, maximum), estimate.Number("standardUncertainty", 0, double.MaxValue));
    }

    /// <summary>Reports members that nobody reads: a misspelt optional member must not pass unnoticed.</summary>
    public void OnlyMembers(params ReadOnlySpan<string> names)
    {
        foreach (JsonProperty property in _element.EnumerateObject())
        {
            if (!names.Contains(property.Name))
            {
                Report("unknown-member", "This member is not known.", $"Remove it or use one of: {string.Join(", ", names!)}.", property.Name);
            }
        }
    }

    /// <summary>How an enumeration member is written in the file.</summary>
    public static string ChoiceName<T>(T value)
        where T : struct, Enum => JsonNamingPolicy.KebabCaseLower.ConvertName(value.ToString());

    private static string? Quote(JsonElement element) => Finding.Quote(element.GetRawText());

    private JsonCursor? Child(string name, JsonValueKind kind, string kindName, bool required)
    {
        if (!_element.TryGetProperty(name, out JsonElement found))
        {
            if (required)
            {
                _findings.Add(new Finding("missing", At(name), $"The member {name} is missing.", null, $"Add {kindName}."));
            }

            return null;
        }

        JsonCursor child = new(found, At(name), _findings);
        if (found.ValueKind == kind)
        {
            return child;
        }

        child.Report("wrong-type", $"This is not {kindName}.", $"Write {kindName}.");
        return null;
    }

    private string At(string? member) =>
        member is null ? Pointer : $"{Pointer}/{member.Replace("~", "~0", StringComparison.Ordinal).Replace("/", "~1", StringComparison.Ordinal)}";
}
