using LabWatch.Metrology.Hazards;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Service.Calc;

/// <summary>Dew and frost point.</summary>
internal sealed class DewPointCalculator : Calculator
{
    public override string Name => "dew-point";

    public override string Summary => "Dew and frost point of moist air, and the margin of the coldest wall above them.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "e = RH/100 e_w(t), RH over water; dew point: e_w(t_d) = e; frost point: e_i(t_f) = e; pure phase, no enhancement factor",
        "u(t_d)^2 = (u(t) (ln e_w)'(t) / (ln e_w)'(t_d))^2 + (u(RH) / (RH (ln e_w)'(t_d)))^2",
    ];

    public override IReadOnlyList<string> Source { get; } =
    [
        "sonntag: D. Sonntag, Z. Meteorol. 40 (1990) 340; wmo: WMO No. 8, annex 4.B",
        "hyland-wexler: R. W. Hyland and A. Wexler, ASHRAE Trans. 89 (1983) 500; hardy: B. Hardy (1998)",
    ];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Number("t_c", "air temperature, degree Celsius") with { Minimum = -100, Maximum = 100 },
        CalcField.Positive("rh_percent", "relative humidity over water, percent") with { Maximum = 100 },
        CalcField.NotNegative("u_t_k", "standard uncertainty of t_c, kelvin; 0 where missing").Optional(),
        CalcField.NotNegative("u_rh_percent", "standard uncertainty of rh_percent; 0 where missing").Optional(),
        CalcField.Choice("formula", "saturation formula; sonntag where missing", Slugged<SaturationFormula>.Names).Optional(),
        CalcField.Positive("p_pa", "total pressure, pascal; 101325 where missing").Optional(),
        CalcField.Celsius("wall_c", "temperature of the coldest wall, degree Celsius").Optional(),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("dew_point_c", "dew point (over water), degree Celsius"),
        ("u_dew_point_k", "its standard uncertainty, kelvin"),
        ("frost_point_c", "frost point (over ice), degree Celsius; null above 0.01 degC"),
        ("u_frost_point_k", "its standard uncertainty, kelvin"),
        ("condensation_c", "where the first drop or crystal settles: the frost point below 0 degC, else the dew point"),
        ("vapour_pa", "vapour pressure, pascal"),
        ("mole_ratio_ppm", "water vapour to dry gas, 1e-6"),
        ("wall_margin_k", "wall_c minus condensation_c, kelvin; at least 2 is asked for before cooling"),
    ];

    public override string Example => """{ "t_c": 23, "rh_percent": 45, "u_t_k": 0.2, "u_rh_percent": 1.5, "wall_c": 5 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        SaturationFormula formula = Slugged<SaturationFormula>.Parse(input.Text("formula", "sonntag"));
        Estimate air = new(input.Number("t_c"), input.Number("u_t_k", 0));
        Estimate relative = new(input.Number("rh_percent"), input.Number("u_rh_percent", 0));
        Estimate dew = Humidity.DewPoint(air, relative, formula);
        Estimate frost = Humidity.FrostPoint(air, relative, formula);
        double vapour = relative.Value / 100 * SaturationPressure.OverWater(air.Value, formula);
        double condensation = Humidity.CondensationPoint(air.Value, relative.Value, formula);
        result.Add("dew_point_c", "u_dew_point_k", dew)
            .Add("frost_point_c", "u_frost_point_k", frost.Value <= 0.01 ? frost : Estimate.None)
            .Add("condensation_c", condensation)
            .Add("vapour_pa", vapour)
            .Add("mole_ratio_ppm", Humidity.MoleRatio(vapour, input.Number("p_pa", 101_325)))
            .Step("saturation_over_water_pa", SaturationPressure.OverWater(air.Value, formula));
        if (input.Has("wall_c"))
        {
            result.Add("wall_margin_k", input.Number("wall_c") - condensation);
        }
    }
}
