using System.Text.Json.Nodes;
using LabWatch.Service.Calc;

namespace LabWatch.Tests.Calc;

public sealed class CalcRunnerTests
{
    private static readonly Calculator Prt = Calculators.Find("prt-cvd")!;

    [Fact]
    public void RunWhole_GoodInput_AnswersOneObject()
    {
        (int code, string text) = Whole("""{ "r_ohm": 138.5055 }""", explain: false);

        Assert.Equal(0, code);
        Assert.Equal(100, JsonNode.Parse(text)!["t_c"]!.GetValue<double>(), 1e-9);
    }

    [Fact]
    public void RunWhole_WithExplain_ShowsFormulaSourceAndSteps()
    {
        (_, string text) = Whole("""{ "r_ohm": 138.5055 }""", explain: true);

        JsonNode explain = JsonNode.Parse(text)!["explain"]!;
        Assert.Equal("IEC 60751:2022, clause 4.2", explain["source"]![0]!.GetValue<string>());
        Assert.Equal(1.385055, explain["steps"]!["r_over_r0"]!.GetValue<double>(), 1e-12);
    }

    [Theory]
    [InlineData("", "not-json", "")]
    [InlineData("[1]", "wrong-type", "")]
    [InlineData("""{ "r_ohm": "138" }""", "wrong-type", "/r_ohm")]
    [InlineData("""{ "r_ohm": -1 }""", "out-of-range", "/r_ohm")]
    [InlineData("""{ "r_ohm": 1e999 }""", "wrong-type", "/r_ohm")]
    [InlineData("""{ "r_ohm": 100, "r_ohm": 101 }""", "not-json", "")]
    [InlineData("""{ }""", "one-of", "")]
    public void RunWhole_BadInput_AnswersFindings(string input, string code, string where)
    {
        (int exit, string text) = Whole(input, explain: false);

        JsonNode finding = Assert.Single(JsonNode.Parse(text)!["findings"]!.AsArray())!;
        Assert.Equal(2, exit);
        Assert.Equal(code, finding["code"]!.GetValue<string>());
        Assert.Equal(where, finding["where"]!.GetValue<string>());
    }

    [Fact]
    public void RunLines_AnswersEachLineInOrder_AndGoesOnAfterABadOne()
    {
        using StringReader input = new("""
            { "r_ohm": 100 }
            nonsense
            { "r_ohm": 138.5055 }
            """);
        using StringWriter output = new();

        int exit = CalcRunner.RunLines(Prt, input, output, explain: false);

        JsonNode[] answers = [.. output.ToString().Split('\n', StringSplitOptions.RemoveEmptyEntries).Select(line => JsonNode.Parse(line)!)];
        Assert.Equal(2, exit);
        Assert.Equal(3, answers.Length);
        Assert.Equal(0, answers[0]["t_c"]!.GetValue<double>(), 1e-9);
        Assert.Equal("not-json", answers[1]["findings"]![0]!["code"]!.GetValue<string>());
        Assert.Equal(100, answers[2]["t_c"]!.GetValue<double>(), 1e-9);
    }

    private static (int Code, string Text) Whole(string json, bool explain)
    {
        using StringReader input = new(json);
        using StringWriter output = new();
        return (CalcRunner.RunWhole(Prt, input, output, explain), output.ToString());
    }
}
