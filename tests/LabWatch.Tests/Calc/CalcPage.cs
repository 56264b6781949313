using System.Globalization;
using System.Text;
using System.Text.Json.Nodes;
using LabWatch.Service.Calc;

namespace LabWatch.Tests.Calc;

/// <summary>Writes docs/reference/calc.md from the calculators.</summary>
internal static class CalcPage
{
    public static string Write(IReadOnlyList<Calculator> calculators)
    {
        StringBuilder page = new();
        page.Append("""
            # Calculators

            `labwatch calc NAME` computes by hand any number that the service reports: a JSON object in, a JSON object out. This page is generated from
            the calculators (`LABWATCH_WRITE_DOCS=1 dotnet run --project tests/LabWatch.Tests -- -class '*.CalcPageTests'`); a test keeps it current and
            runs every example.

            | option | meaning |
            |---|---|
            | `--in FILE` | file to read; standard input where it is missing |
            | `--lines` | one JSON object a line, answered one a line, in order and at once; a bad line is answered by its findings and the rest goes on |
            | `--explain` | adds the member `explain`: formula, source and intermediate values |
            | `--schema` | prints the JSON Schema of the input |
            | `--example` | prints an input to start from |

            Names end in their unit: `_c` degree Celsius, `_k` kelvin (differences and uncertainties), `_ohm`, `_mv` millivolt, `_um` micrometre, `_s`
            seconds, `_pa` pascal; `u_` is a standard uncertainty. `null` means: there is no such number. Input that is not right is answered by
            `findings`, all at once, each with code, JSON Pointer, message, value and cure; the exit code is 2 then, else 0. Numbers in the answers
            below are rounded; the program writes them in full.


            """);
        foreach (Calculator calculator in calculators)
        {
            Append(page, calculator);
        }

        return page.ToString().ReplaceLineEndings("\n");
    }

    private static void Append(StringBuilder page, Calculator calculator)
    {
        page.Append(CultureInfo.InvariantCulture, $"## {calculator.Name}\n\n{calculator.Summary}\n\n");
        foreach (string line in calculator.Formula)
        {
            page.Append(CultureInfo.InvariantCulture, $"- {line}\n");
        }

        page.Append(CultureInfo.InvariantCulture, $"\nSource: {string.Join("; ", calculator.Source)}.\n\n| input | needed | what it is |\n|---|---|---|\n");
        AppendFields(page, calculator.Fields, string.Empty);
        page.Append("\n| output | what it is |\n|---|---|\n");
        foreach ((string name, string description) in calculator.Outputs)
        {
            page.Append(CultureInfo.InvariantCulture, $"| `{name}` | {Cell(description)} |\n");
        }

        CalcResult result = calculator.Run(calculator.Example, out _)!;
        page.Append(CultureInfo.InvariantCulture, $"\n```json\n{CalcRunner.Text(JsonNode.Parse(calculator.Example)!)}\n```\n\nis answered by\n\n");
        page.Append(CultureInfo.InvariantCulture, $"```json\n{CalcRunner.Text(Rounded(result.Values)!)}\n```\n\n");
    }

    private static void AppendFields(StringBuilder page, IReadOnlyList<CalcField> fields, string prefix)
    {
        foreach (CalcField field in fields)
        {
            string choices = field.Choices.Count > 0 ? $" ({string.Join(", ", field.Choices)})" : string.Empty;
            string items = field.Kind is CalcFieldKind.Objects or CalcFieldKind.Numbers ? "[]" : string.Empty;
            page.Append(CultureInfo.InvariantCulture, $"| `{prefix}{field.Name}{items}` | {(field.Required ? "yes" : "no")} | {Cell(field.Description + choices)} |\n");
            AppendFields(page, field.Fields, $"{prefix}{field.Name}{items}.");
        }
    }

    private static string Cell(string text) => text.Replace("|", "\\|", StringComparison.Ordinal);

    /// <summary>A copy with numbers to six digits, the same on every platform.</summary>
    private static JsonNode? Rounded(JsonNode? node) => node switch
    {
        JsonObject o => new JsonObject(o.Select(member => KeyValuePair.Create(member.Key, Rounded(member.Value)))),
        JsonArray a => new JsonArray([.. a.Select(Rounded)]),
        JsonValue v when v.TryGetValue(out double number) && number != Math.Floor(number) =>
            JsonValue.Create(double.Parse(number.ToString("G6", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture)),
        _ => node?.DeepClone(),
    };
}
