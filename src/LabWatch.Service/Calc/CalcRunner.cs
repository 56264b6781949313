using System.Text.Encodings.Web;
using System.Text.Json;
using System.Text.Json.Nodes;
using LabWatch.Lab.Findings;
using LabWatch.Service.Commands;

namespace LabWatch.Service.Calc;

/// <summary>Runs a calculator over text: one object for the whole input, or one a line.</summary>
internal static class CalcRunner
{
    private static readonly JsonSerializerOptions OneLine = new() { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };
    private static readonly JsonSerializerOptions Indented = new(OneLine) { WriteIndented = true };
    private static readonly JsonSerializerOptions FindingJson = new(JsonSerializerDefaults.Web);

    /// <summary>Answers a whole input with one indented object.</summary>
    public static int RunWhole(Calculator calculator, TextReader input, TextWriter output, bool explain)
    {
        JsonObject answer = Answer(calculator, input.ReadToEnd(), explain, out bool isGood);
        output.WriteLine(Text(answer));
        return isGood ? ExitCode.Success : ExitCode.BadInput;
    }

    /// <summary>Answers each line with one line, in order, at once; a bad line is answered by its findings and the rest goes on.</summary>
    public static int RunLines(Calculator calculator, TextReader input, TextWriter output, bool explain)
    {
        bool allGood = true;
        while (input.ReadLine() is { } line)
        {
            JsonObject answer = Answer(calculator, line, explain, out bool isGood);
            output.WriteLine(answer.ToJsonString(OneLine));
            output.Flush();
            allGood &= isGood;
        }

        return allGood ? ExitCode.Success : ExitCode.BadInput;
    }

    /// <summary>A JSON object, indented for people.</summary>
    public static string Text(JsonNode node) => node.ToJsonString(Indented).ReplaceLineEndings("\n");

    private static JsonObject Answer(Calculator calculator, string json, bool explain, out bool isGood)
    {
        CalcResult? result = calculator.Run(json, out IReadOnlyList<Finding> findings);
        isGood = result is not null;
        if (result is null)
        {
            return new() { ["findings"] = JsonSerializer.SerializeToNode(findings, FindingJson) };
        }

        if (explain)
        {
            result.Values["explain"] = new JsonObject
            {
                ["formula"] = Lines(calculator.Formula),
                ["source"] = Lines(calculator.Source),
                ["steps"] = result.Steps,
            };
        }

        return result.Values;
    }

    private static JsonArray Lines(IReadOnlyList<string> lines) => [.. lines.Select(line => JsonValue.Create(line))];
}
