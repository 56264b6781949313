using System.Text.Json.Nodes;
using LabWatch.Service.Calc;

namespace LabWatch.Tests.Calc;

public sealed class CalculatorValueTests
{
    /// <summary>Input, output member and its published value; the source stands beside each.</summary>
    public static TheoryData<string, string, string, double, double> Published { get; } = new()
    {
        // IEC 60751:2022, table of a Pt100 (from memory).
        { "prt-cvd", """{ "t_c": -100 }""", "r_ohm", 60.26, 0.0051 },
        { "prt-cvd", """{ "r_ohm": 390.48 }""", "t_c", 850, 0.02 },

        // IEC 60584-1:2013 = NIST SRD 60, tables (from memory): type K at 1000 degC, type S at 1000 degC.
        { "thermocouple", """{ "type": "K", "t_c": 1000 }""", "emf_mv", 41.276, 0.00055 },
        { "thermocouple", """{ "type": "S", "emf_mv": 9.587 }""", "t_c", 1000, 0.05 },

        // Preston-Thomas 1990, table 1: Wr of tin 1.89279768, with no deviation.
        { "prt-its90", """{ "t_c": 231.928, "r_tpw_ohm": 25, "above": { "subrange": "water-to-tin", "a": 0 } }""", "w", 1.89279768, 6e-9 },

        // JCGM 100:2008, table G.2: t(95.45 %) for 5 degrees of freedom.
        { "budget", """{ "inputs": [ { "name": "a", "u": 1, "dof": 5 } ] }""", "k", 2.65, 0.0051 },

        // JCGM 106:2012, 7.4, burst pressure (from memory).
        { "decision", """{ "value": 509.7, "u": 8.6, "lower": 490 }""", "conformity_probability", 0.99, 0.0051 },

        // ISO 13732-1:2006 (from memory, unconfirmed).
        { "burn-threshold", """{ "material": "plastic", "contact_s": 60 }""", "threshold_c", 60, 0 },

        // WMO No. 8, annex 4.B: 243.12 ln(e/6.112)/(17.62 - ln(e/6.112)).
        { "dew-point", """{ "t_c": 23, "rh_percent": 45, "formula": "wmo" }""", "dew_point_c", 10.422873252741866, 1e-9 },

        // Common practice, no source: size of half a percent of emissivity at 300 degC, 8-14 um, surroundings 23 degC.
        { "radiance", """{ "lower_um": 8, "upper_um": 14, "t_c": 300, "emissivity": 0.995, "background_c": 23 }""", "difference_k", -0.96, 0.006 },
    };

    [Theory]
    [MemberData(nameof(Published))]
    public void Answer_is_the_published_value(string name, string input, string output, double expected, double tolerance)
    {
        CalcResult? result = Calculators.Find(name)!.Run(input, out _);

        Assert.Equal(expected, result!.Values[output]!.GetValue<double>(), tolerance);
    }

    [Fact]
    public void Emissivity_from_both_temperatures_undoes_the_radiance_temperature()
    {
        Calculator calculator = Calculators.Find("radiance")!;
        JsonObject forward = calculator.Run("""{ "wavelength_um": 3.9, "t_c": 200, "emissivity": 0.97, "background_c": 23 }""", out _)!.Values;
        JsonObject input = new() { ["wavelength_um"] = 3.9, ["t_c"] = 200, ["t_rad_c"] = forward["t_rad_c"]!.GetValue<double>(), ["background_c"] = 23 };

        Assert.Equal(0.97, calculator.Run(input.ToJsonString(), out _)!.Values["emissivity"]!.GetValue<double>(), 1e-12);
    }

    [Theory]
    [InlineData("decision", """{ "value": 1, "u": 0.1 }""", "empty-range")]
    [InlineData("radiance", """{ "lower_um": 14, "upper_um": 8, "t_c": 20 }""", "empty-range")]
    [InlineData("budget", """{ "inputs": [ { "name": "a", "u": 1 } ], "correlations": [ { "first": "a", "second": "b", "r": 0.5 } ] }""", "unknown-reference")]
    [InlineData("prt-its90", """{ "r_ohm": 30, "r_tpw_ohm": 25 }""", "one-of")]
    [InlineData("thermocouple", """{ "type": "C", "emf_mv": 3 }""", "unknown-choice")]
    public void What_members_violate_together_is_a_finding(string name, string input, string code)
    {
        Assert.Null(Calculators.Find(name)!.Run(input, out IReadOnlyList<LabWatch.Lab.Findings.Finding> findings));
        Assert.Equal(code, Assert.Single(findings).Code);
    }
}
