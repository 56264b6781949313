using System.Globalization;
using System.Text.Json;

namespace LabWatch.Metrology.Tests.Checks;

/// <summary>
/// One row of a check file with the common columns: id, group, quantity, inputs (JSON object), expected, unit, tol, tol_kind (abs, rel, exact),
/// tol_reason, status (PC published and recomputed, PM published from memory only, C computed only, F fact), source, note.
/// </summary>
public sealed class CheckRow
{
    private readonly IReadOnlyDictionary<string, string> _fields;
    private readonly JsonElement _inputs;

    internal CheckRow(IReadOnlyDictionary<string, string> fields)
    {
        _fields = fields;
        using JsonDocument inputs = JsonDocument.Parse(fields["inputs"].Length == 0 ? "{}" : fields["inputs"]);
        _inputs = inputs.RootElement.Clone();
    }

    public string Id => _fields["id"];

    public string Group => _fields["group"];

    public string Quantity => _fields["quantity"];

    public string Expected => _fields["expected"];

    public string Unit => _fields["unit"];

    public double Tolerance => double.Parse(_fields["tol"], CultureInfo.InvariantCulture);

    public string ToleranceKind => _fields["tol_kind"];

    public string Status => _fields["status"];

    public string Source => _fields["source"];

    public string InputText => _fields["inputs"];

    /// <summary>The rows of a file in <c>Checks/Data</c>.</summary>
    internal static IReadOnlyList<CheckRow> Read(string fileName) => [.. CsvFile.Read(fileName).Select(fields => new CheckRow(fields))];

    /// <summary>Whether there is an input of a name that is not null.</summary>
    public bool Has(string name) => _inputs.TryGetProperty(name, out JsonElement value) && value.ValueKind != JsonValueKind.Null;

    /// <summary>An input as text.</summary>
    public string Text(string name) => _inputs.GetProperty(name).ToString();

    /// <summary>An input as a number, whether it stands as a JSON number or as text; <c>inf</c> is infinity.</summary>
    public double Number(string name) => ToNumber(_inputs.GetProperty(name));

    /// <summary>An input as numbers: a JSON array, or text with spaces between them.</summary>
    public double[] Numbers(string name)
    {
        JsonElement value = _inputs.GetProperty(name);
        return value.ValueKind == JsonValueKind.Array
            ? [.. value.EnumerateArray().Select(ToNumber)]
            : [.. value.GetString()!.Split(' ', StringSplitOptions.RemoveEmptyEntries).Select(Parse)];
    }

    /// <summary>An input as raw JSON, for what has a shape of its own.</summary>
    public JsonElement Json(string name) => _inputs.GetProperty(name);

    /// <summary>A JSON number, or text that is one, as a number.</summary>
    public static double ToNumber(JsonElement value) =>
        value.ValueKind == JsonValueKind.Number ? value.GetDouble() : Parse(value.GetString()!);

    internal static double Parse(string text) =>
        text is "inf" ? double.PositiveInfinity : double.Parse(text, NumberStyles.Float, CultureInfo.InvariantCulture);
}
