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

        // JCGM 106:2012, equations 17 to 19, by quadrature with 40 digits; centred normal process, tolerance and acceptance limits 2.
        { "decision-risk", """{ "process_mean": 0, "process_deviation": 1, "u": 0.25, "lower": -2, "upper": 2 }""", "consumer_risk", 0.008006084834450094, 8e-11 },
        { "decision-risk", """{ "process_mean": 0, "process_deviation": 1, "u": 0.5, "lower": -2, "upper": 2, "guard_band": 1 }""", "producer_risk", 0.3259281949104071, 3e-9 },

        // Lucas and Saccucci 1990, table 3 (from memory): lambda 0.4, limits 3.054, shift 0.25 and 1.5.
        { "control-chart", """{ "chart": "ewma", "lambda": 0.4, "limit": 3.054, "shift": 0.25 }""", "run_length_with_shift", 224, 0.55 },
        { "control-chart", """{ "chart": "ewma", "lambda": 0.4, "limit": 3.054, "shift": 1.5 }""", "run_length_with_shift", 5.9, 0.055 },

        // Cao and Rhinehart 1995, recursion (from memory), in exact decimals at the tenth value after the start.
        { "steady-state", """{ "value": [0, 1, 0.1, 0.6, 0.3, 0.3, 0.6, 0.1, 1, 0, 0.4] }""", "r", 0.7333625183968197, 1e-10 },
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

    // ISO/IEC 17043:2010, B.3.1.3, in exact decimals: U 0.015 and 0.010.
    [Fact]
    public void Normalised_error_compares_with_the_reference()
    {
        CalcResult? result = Calculators.Find("agreement")!.Run(
            """{ "results": [ { "value": 100.012, "u": 0.0075 } ], "reference": 100, "u_reference": 0.005 }""", out _);

        Assert.Equal(0.6656402354702749, result!.Values["e_n"]![0]!.GetValue<double>(), 1e-9);
    }

    // tau ln((T_s - T_a)/(T_t - T_a)): 500 to 48 degC at 23 degC with 3600 s takes 10615.106 s; the readings follow the law exactly.
    [Fact]
    public void Cooling_by_the_law_reaches_the_threshold_when_the_law_says()
    {
        string readings = string.Join(", ", Enumerable.Range(0, 30).Select(i =>
            (23 + (477 * Math.Exp(-i * 60 / 3600.0))).ToString("R", System.Globalization.CultureInfo.InvariantCulture)));
        CalcResult? result = Calculators.Find("cooling")!.Run(
            $$"""{ "celsius": [{{readings}}], "step_s": 60, "ambient_c": 23, "threshold_c": 48 }""", out _);

        Assert.Equal(10615.106397672506 - (29 * 60), result!.Values["seconds_to_threshold"]!.GetValue<double>(), 1e-3);
    }

    [Fact]
    public void A_value_far_from_its_neighbours_is_a_spike()
    {
        CalcResult? result = Calculators.Find("spikes")!.Run(
            """{ "value": [20.01, 20.02, 20.00, null, 23.7, 20.02, 20.01, 19.99, 20.00, 20.02], "half_width": 3 }""", out _);

        Assert.Equal("[5]", result!.Values["spikes"]!.ToJsonString());
    }

    [Theory]
    [InlineData("indicated-temperature", """{ "indicated": 1 }""", "one-of")]
    [InlineData("indicated-temperature", """{ "indicated": 1, "points": [ { "indicated_c": 2, "correction_k": 0 }, { "indicated_c": 2, "correction_k": 1 } ] }""", "order")]
    [InlineData("decision-risk", """{ "process_mean": 0, "process_deviation": 1, "u": 1, "lower": -1, "upper": 1, "guard_band": 1 }""", "empty-range")]
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
