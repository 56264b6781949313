using System.CommandLine;
using System.Text;
using System.Text.Json.Nodes;
using LabWatch.Service.Commands;

namespace LabWatch.Service.Calc;

/// <summary>The command <c>calc</c>: one subcommand a calculator.</summary>
internal static class CalcCommand
{
    private static readonly UTF8Encoding Utf8 = new(encoderShouldEmitUTF8Identifier: false);

    /// <summary>Makes the command.</summary>
    public static Command Create()
    {
        Command command = new("calc", "Compute by hand any number that the service reports: JSON in, JSON out.");
        foreach (Calculator calculator in Calculators.All)
        {
            command.Subcommands.Add(CommandOf(calculator));
        }

        return command;
    }

    private static Command CommandOf(Calculator calculator)
    {
        Option<FileInfo?> inFile = new("--in") { Description = "File to read; standard input where it is missing.", HelpName = "FILE" };
        Option<bool> lines = new("--lines") { Description = "Take one JSON object a line and answer one a line, in order." };
        Option<bool> explain = new("--explain") { Description = "Add the formula, its source and intermediate values." };
        Option<bool> schema = new("--schema") { Description = "Print the JSON Schema of the input and stop." };
        Option<bool> example = new("--example") { Description = "Print an input to start from and stop." };
        Command command = new(calculator.Name, calculator.Summary) { inFile, lines, explain, schema, example };
        command.SetAction(parsed =>
        {
            TextWriter output = parsed.InvocationConfiguration.Output;
            if (parsed.GetValue(schema) || parsed.GetValue(example))
            {
                output.WriteLine(CalcRunner.Text(parsed.GetValue(schema) ? CalcSchema.Of(calculator) : JsonNode.Parse(calculator.Example)!));
                return ExitCode.Success;
            }

            return Run(calculator, parsed.GetValue(inFile), parsed.GetValue(lines), parsed.GetValue(explain), output, parsed.InvocationConfiguration.Error);
        });
        return command;
    }

    private static int Run(Calculator calculator, FileInfo? file, bool byLine, bool explain, TextWriter output, TextWriter errors)
    {
        try
        {
            using StreamReader input = new(file?.OpenRead() ?? Console.OpenStandardInput(), Utf8);
            return byLine
                ? CalcRunner.RunLines(calculator, input, output, explain)
                : CalcRunner.RunWhole(calculator, input, output, explain);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            errors.WriteLine($"--in: {e.Message}");
            return ExitCode.BadInput;
        }
    }
}
