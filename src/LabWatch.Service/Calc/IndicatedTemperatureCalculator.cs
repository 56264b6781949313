using LabWatch.Metrology.Thermometry;

namespace LabWatch.Service.Calc;

/// <summary>Indicating thermometers: correction table or polynomial of a certificate.</summary>
internal sealed class IndicatedTemperatureCalculator : Calculator
{
    public override string Name => "indicated-temperature";

    public override string Summary => "Temperature t90 from an indication, or another raw value, by the correction table or the polynomial of a certificate.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "table: t90 = indication + correction, linear between the points; outside of them the nearest correction, not in range",
        "polynomial: t90 = c0 + c1 x + c2 x^2 + ...; outside of its range no temperature",
        "u(t90) is that of the certificate, inside its range only",
    ];

    public override IReadOnlyList<string> Source { get; } = ["common practice, no source"];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Number("indicated", "indication, degree Celsius, or the raw value of the polynomial in its unit"),
        CalcField.Objects(
            "points",
            "correction table, indications rising; give this or coefficients",
            CalcField.Celsius("indicated_c", "indication, degree Celsius"),
            CalcField.Number("correction_k", "correction to add, kelvin")).Optional() with { MaximumItems = 1000 },
        CalcField.Numbers("coefficients", "coefficients of the polynomial, lowest power first; give this or points").Optional() with { MaximumItems = 30 },
        CalcField.Number("raw_minimum", "lowest raw value of the polynomial; open where missing").Optional(),
        CalcField.Number("raw_maximum", "highest raw value of the polynomial; open where missing").Optional(),
        CalcField.NotNegative("u_cal_k", "standard uncertainty of the calibration, kelvin; 0 where missing").Optional(),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("t_c", "temperature t90, degree Celsius; null outside the range of a polynomial"),
        ("u_t_k", "its standard uncertainty, kelvin; null out of range"),
        ("sensitivity", "derivative of t90 by the raw value"),
        ("in_range", "whether the raw value lies where the certificate has points"),
    ];

    public override string Example =>
        """{ "indicated": 99.8, "points": [ { "indicated_c": 0.02, "correction_k": -0.02 }, { "indicated_c": 100.05, "correction_k": -0.05 } ], "u_cal_k": 0.015 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        if (input.Has("points") == input.Has("coefficients"))
        {
            input.Reject("one-of", string.Empty, "Exactly one of points and coefficients is needed.", "Give the table or the polynomial of the certificate.");
            return;
        }

        double raw = input.Number("indicated");
        double u = input.Number("u_cal_k", 0);
        if (input.Has("coefficients"))
        {
            Write(result, new CharacteristicPolynomial(
                input.Numbers("coefficients"),
                input.Number("raw_minimum", double.NegativeInfinity),
                input.Number("raw_maximum", double.PositiveInfinity)).Evaluate(raw, u));
            return;
        }

        CorrectionPoint[] points = [.. input.Objects("points").Select(point => new CorrectionPoint(point.Number("indicated_c"), point.Number("correction_k")))];
        if (points.Zip(points.Skip(1)).Any(pair => !(pair.First.IndicatedCelsius < pair.Second.IndicatedCelsius)))
        {
            input.Reject("order", "points", "The indications of the table do not rise.", "Sort the points by indicated_c and leave out doubles.");
            return;
        }

        Write(result, new CorrectionTable(points).Evaluate(raw, u));
    }

    private static void Write(CalcResult result, TemperatureEvaluation evaluation) => result
        .Add("t_c", "u_t_k", evaluation.Celsius)
        .Add("sensitivity", evaluation.Sensitivity)
        .Add("in_range", evaluation.InRange);
}
