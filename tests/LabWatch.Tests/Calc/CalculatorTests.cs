using System.Text.Json;
using System.Text.Json.Nodes;
using Json.Schema;
using LabWatch.Lab.Findings;
using LabWatch.Service.Calc;

namespace LabWatch.Tests.Calc;

public sealed class CalculatorTests
{
    public static TheoryData<string> Names => [.. Calculators.All.Select(calculator => calculator.Name)];

    [Theory]
    [MemberData(nameof(Names))]
    public void Example_computes_and_names_only_documented_outputs(string name)
    {
        Calculator calculator = Calculators.Find(name)!;

        CalcResult? result = calculator.Run(calculator.Example, out IReadOnlyList<Finding> findings);

        Assert.Empty(findings);
        Assert.NotNull(result);
        Assert.NotEmpty(result.Values);
        Assert.Empty(result.Values.Select(member => member.Key).Except(calculator.Outputs.Select(output => output.Name)));
        Assert.Contains(result.Values, member => member.Value is not null);
    }

    [Theory]
    [MemberData(nameof(Names))]
    public void Example_meets_the_schema(string name)
    {
        Calculator calculator = Calculators.Find(name)!;
        JsonSchema schema = JsonSchema.FromText(CalcSchema.Of(calculator).ToJsonString());
        using JsonDocument example = JsonDocument.Parse(calculator.Example);

        Assert.True(schema.Evaluate(example.RootElement).IsValid);
    }

    [Theory]
    [MemberData(nameof(Names))]
    public void Unknown_member_is_a_finding(string name)
    {
        Calculator calculator = Calculators.Find(name)!;
        JsonObject input = JsonNode.Parse(calculator.Example)!.AsObject();
        input["t_fahrenheit"] = 1;

        Assert.Null(calculator.Run(input.ToJsonString(), out IReadOnlyList<Finding> findings));
        Assert.Contains(findings, finding => finding is { Code: "unknown-member", Where: "/t_fahrenheit" });
    }

    [Fact]
    public void Names_are_unique()
    {
        Assert.Equal(Calculators.All.Count, Calculators.All.Select(calculator => calculator.Name).Distinct().Count());
    }
}
