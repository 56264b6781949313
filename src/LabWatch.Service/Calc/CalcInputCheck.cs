using System.Globalization;
using System.Text.Json;
using LabWatch.Lab.Findings;

namespace LabWatch.Service.Calc;

/// <summary>Checks a JSON value against the fields of a calculator, all findings at once.</summary>
internal static class CalcInputCheck
{
    /// <summary>Checks an object and everything inside.</summary>
    public static void Object(JsonElement element, string pointer, IReadOnlyList<CalcField> fields, List<Finding> findings)
    {
        if (element.ValueKind != JsonValueKind.Object)
        {
            findings.Add(Wrong("wrong-type", pointer, "An object belongs here.", element, "Write an object in braces."));
            return;
        }

        foreach (JsonProperty member in element.EnumerateObject())
        {
            if (!fields.Any(field => member.NameEquals(field.Name)))
            {
                string cure = $"Use: {string.Join(", ", fields.Select(field => field.Name))}.";
                findings.Add(Wrong("unknown-member", At(pointer, member.Name), "This member is not known.", member.Value, cure));
            }
        }

        foreach (CalcField field in fields)
        {
            if (element.TryGetProperty(field.Name, out JsonElement value) && value.ValueKind != JsonValueKind.Null)
            {
                Member(value, At(pointer, field.Name), field, findings);
            }
            else if (field.Required)
            {
                findings.Add(new("missing", At(pointer, field.Name), "This member is needed.", null, $"Add it: {field.Description}."));
            }
        }
    }

    private static void Member(JsonElement value, string pointer, CalcField field, List<Finding> findings)
    {
        switch (field.Kind)
        {
            case CalcFieldKind.Number or CalcFieldKind.Integer:
                Number(value, pointer, field, findings);
                break;
            case CalcFieldKind.Flag when value.ValueKind is not (JsonValueKind.True or JsonValueKind.False):
                findings.Add(Wrong("wrong-type", pointer, "True or false belongs here.", value, "Write true or false."));
                break;
            case CalcFieldKind.Choice when value.ValueKind != JsonValueKind.String || !field.Choices.Contains(value.GetString()):
                findings.Add(Wrong("unknown-choice", pointer, "This is none of the choices.", value, $"Use one of: {string.Join(", ", field.Choices)}."));
                break;
            case CalcFieldKind.Text when value.ValueKind != JsonValueKind.String:
                findings.Add(Wrong("wrong-type", pointer, "A text belongs here.", value, "Write a text in quotes."));
                break;
            case CalcFieldKind.Object:
                Object(value, pointer, field.Fields, findings);
                break;
            case CalcFieldKind.Numbers or CalcFieldKind.Objects:
                Array(value, pointer, field, findings);
                break;
        }
    }

    private static void Number(JsonElement value, string pointer, CalcField field, List<Finding> findings)
    {
        bool isWhole = field.Kind == CalcFieldKind.Integer;
        if (value.ValueKind != JsonValueKind.Number || !double.IsFinite(value.GetDouble()) || (isWhole && !value.TryGetInt64(out _)))
        {
            findings.Add(Wrong("wrong-type", pointer, isWhole ? "A whole number belongs here." : "A number belongs here.", value, $"Write {field.Description}."));
            return;
        }

        double number = value.GetDouble();
        if (number < field.Minimum || number > field.Maximum || (field.IsAboveMinimum && number == field.Minimum))
        {
            findings.Add(Wrong("out-of-range", pointer, "This number is outside what is possible.", value, $"Use {RangeOf(field)}."));
        }
    }

    private static void Array(JsonElement value, string pointer, CalcField field, List<Finding> findings)
    {
        if (value.ValueKind != JsonValueKind.Array)
        {
            findings.Add(Wrong("wrong-type", pointer, "An array belongs here.", value, "Write an array in brackets."));
            return;
        }

        int count = value.GetArrayLength();
        if (count < field.MinimumItems || count > field.MaximumItems)
        {
            findings.Add(new("wrong-count", pointer, "This array has too few or too many items.", count.ToString(CultureInfo.InvariantCulture), $"Use {field.MinimumItems} to {field.MaximumItems} items."));
        }

        int index = 0;
        foreach (JsonElement item in value.EnumerateArray())
        {
            string at = string.Create(CultureInfo.InvariantCulture, $"{pointer}/{index++}");
            if (field.Kind == CalcFieldKind.Objects)
            {
                Object(item, at, field.Fields, findings);
            }
            else if (!(field.AllowsGaps && item.ValueKind == JsonValueKind.Null))
            {
                Number(item, at, field, findings);
            }
        }
    }

    /// <summary>The permitted numbers in words.</summary>
    internal static string RangeOf(CalcField field)
    {
        string low = string.Create(CultureInfo.InvariantCulture, $"{(field.IsAboveMinimum ? "above" : "at least")} {field.Minimum}");
        string high = string.Create(CultureInfo.InvariantCulture, $"at most {field.Maximum}");
        return (double.IsFinite(field.Minimum), double.IsFinite(field.Maximum)) switch
        {
            (true, true) => $"{low} and {high}",
            (true, false) => low,
            (false, true) => high,
            _ => "any number",
        };
    }

    private static string At(string pointer, string member) =>
        $"{pointer}/{member.Replace("~", "~0", StringComparison.Ordinal).Replace("/", "~1", StringComparison.Ordinal)}";

    private static Finding Wrong(string code, string pointer, string message, JsonElement value, string cure) =>
        new(code, pointer, message, Finding.Quote(value.GetRawText()), cure);
}
