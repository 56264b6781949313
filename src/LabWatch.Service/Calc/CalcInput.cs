using System.Text.Json;
using LabWatch.Lab.Findings;

namespace LabWatch.Service.Calc;

/// <summary>An input object that meets the fields of its calculator.</summary>
internal sealed class CalcInput
{
    private static readonly JsonDocumentOptions Options = new() { AllowDuplicateProperties = false };

    private readonly JsonElement _element;
    private readonly List<Finding> _findings;

    internal CalcInput(JsonElement element, string pointer, List<Finding> findings)
    {
        _element = element;
        Pointer = pointer;
        _findings = findings;
    }

    /// <summary>JSON Pointer of this object (RFC 6901); empty for the whole input.</summary>
    public string Pointer { get; }

    /// <summary>Reads and checks a whole input; null with findings where it is no object or does not meet the fields.</summary>
    public static CalcInput? Read(string json, IReadOnlyList<CalcField> fields, List<Finding> findings)
    {
        JsonElement root;
        try
        {
            using JsonDocument document = JsonDocument.Parse(json, Options);
            root = document.RootElement.Clone();
        }
        catch (JsonException e)
        {
            findings.Add(new("not-json", string.Empty, $"This is no JSON: {e.Message}", Finding.Quote(json), "Write one JSON object; --example prints one."));
            return null;
        }

        CalcInputCheck.Object(root, string.Empty, fields, findings);
        return findings.Count == 0 ? new CalcInput(root, string.Empty, findings) : null;
    }

    /// <summary>Whether a member is there and not null.</summary>
    public bool Has(string name) => _element.TryGetProperty(name, out JsonElement value) && value.ValueKind != JsonValueKind.Null;

    /// <summary>A number; <paramref name="otherwise"/> where the member is missing.</summary>
    public double Number(string name, double otherwise = double.NaN) => Has(name) ? _element.GetProperty(name).GetDouble() : otherwise;

    /// <summary>A whole number; <paramref name="otherwise"/> where the member is missing.</summary>
    public long Integer(string name, long otherwise = 0) => Has(name) ? _element.GetProperty(name).GetInt64() : otherwise;

    /// <summary>True or false; false where the member is missing.</summary>
    public bool Flag(string name) => Has(name) && _element.GetProperty(name).GetBoolean();

    /// <summary>A word or text; <paramref name="otherwise"/> where the member is missing.</summary>
    public string Text(string name, string otherwise = "") => Has(name) ? _element.GetProperty(name).GetString()! : otherwise;

    /// <summary>An array of numbers, NaN for gaps; empty where the member is missing.</summary>
    public double[] Numbers(string name) =>
        Has(name)
            ? [.. _element.GetProperty(name).EnumerateArray().Select(item => item.ValueKind == JsonValueKind.Null ? double.NaN : item.GetDouble())]
            : [];

    /// <summary>An object; null where the member is missing.</summary>
    public CalcInput? Object(string name) => Has(name) ? new CalcInput(_element.GetProperty(name), $"{Pointer}/{name}", _findings) : null;

    /// <summary>An array of objects; empty where the member is missing.</summary>
    public IReadOnlyList<CalcInput> Objects(string name) =>
        Has(name)
            ? [.. _element.GetProperty(name).EnumerateArray().Select((item, i) => new CalcInput(item, $"{Pointer}/{name}/{i}", _findings))]
            : [];

    /// <summary>Reports what is wrong with a member, or with the whole object where the name is empty.</summary>
    public void Reject(string code, string member, string message, string cure) =>
        _findings.Add(new(
            code,
            member.Length == 0 ? Pointer : $"{Pointer}/{member}",
            message,
            member.Length > 0 && _element.TryGetProperty(member, out JsonElement value) ? Finding.Quote(value.GetRawText()) : null,
            cure));
}
