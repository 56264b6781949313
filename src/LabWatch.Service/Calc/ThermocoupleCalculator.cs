using LabWatch.Metrology.Thermometry;

namespace LabWatch.Service.Calc;

/// <summary>Thermocouples both ways.</summary>
internal sealed class ThermocoupleCalculator : Calculator
{
    public override string Name => "thermocouple";

    public override string Summary => "Temperature from the emf of a letter-designated thermocouple with its reference junction, or emf from temperature.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "E_measured = E(t) - E(t_ref), E(t) = E_reference(t) + d1 t + d2 t^2 + ...; solved for t",
        "u(t)^2 = (u(E) / S(t))^2 + (u(t_ref) S(t_ref) / S(t))^2 + u_cal^2, S = dE/dt",
    ];

    public override IReadOnlyList<string> Source { get; } = ["IEC 60584-1:2013 (reference functions as in NIST Monograph 175, 1993)"];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Choice("type", "type", Enum.GetNames<ThermocoupleType>()),
        CalcField.Number("emf_mv", "emf measured, millivolt; give this or t_c").Optional(),
        CalcField.Celsius("t_c", "temperature of the hot junction, degree Celsius; give this or emf_mv").Optional(),
        CalcField.Celsius("t_ref_c", "temperature of the reference junctions, degree Celsius; 0 where missing").Optional(),
        CalcField.Numbers("deviation_mv", "coefficients of t, t^2, ... of the certificate's deviation, millivolt") with
        {
            Required = false, MinimumItems = 0, MaximumItems = 10,
        },
        CalcField.NotNegative("u_emf_mv", "standard uncertainty of the emf, millivolt; 0 where missing").Optional(),
        CalcField.NotNegative("u_t_ref_k", "standard uncertainty of t_ref_c, kelvin; 0 where missing").Optional(),
        CalcField.NotNegative("u_cal_k", "standard uncertainty of the calibration, kelvin; 0 where missing").Optional(),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("t_c", "temperature t90, degree Celsius; null outside the type's range"),
        ("u_t_k", "its standard uncertainty, kelvin"),
        ("emf_mv", "emf between the reference junctions, millivolt"),
        ("dt_de_k_per_mv", "sensitivity, kelvin per millivolt"),
        ("in_range", "whether the type has a temperature for this emf"),
    ];

    public override string Example => """{ "type": "S", "emf_mv": 9.4, "t_ref_c": 25, "u_emf_mv": 0.002, "u_t_ref_k": 0.1, "u_cal_k": 0.4 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        if (input.Has("emf_mv") == input.Has("t_c"))
        {
            input.Reject("one-of", string.Empty, "Exactly one of emf_mv and t_c is needed.", "Give emf_mv for a temperature, t_c for an emf.");
            return;
        }

        Thermocouple thermocouple = new(Enum.Parse<ThermocoupleType>(input.Text("type")), input.Numbers("deviation_mv"));
        double reference = input.Number("t_ref_c", 0);
        double emf = input.Has("emf_mv")
            ? input.Number("emf_mv")
            : thermocouple.EmfMillivolt(input.Number("t_c")) - thermocouple.EmfMillivolt(reference);
        TemperatureEvaluation bare = thermocouple.Evaluate(emf, reference, 0);
        double fromEmf = bare.Sensitivity * input.Number("u_emf_mv", 0);
        double fromReference = bare.Sensitivity * thermocouple.SlopeMillivoltPerKelvin(reference) * input.Number("u_t_ref_k", 0);
        double u = double.Hypot(double.Hypot(fromEmf, fromReference), input.Number("u_cal_k", 0));
        TemperatureEvaluation evaluation = thermocouple.Evaluate(emf, reference, u);
        result.Add("t_c", "u_t_k", evaluation.Celsius)
            .Add("emf_mv", emf)
            .Add("dt_de_k_per_mv", evaluation.Sensitivity)
            .Add("in_range", evaluation.InRange)
            .Step("emf_of_t_ref_mv", thermocouple.EmfMillivolt(reference))
            .Step("emf_sum_mv", emf + thermocouple.EmfMillivolt(reference))
            .Step("seebeck_mv_per_k", 1 / evaluation.Sensitivity)
            .Step("u_from_emf_k", Math.Abs(fromEmf))
            .Step("u_from_t_ref_k", Math.Abs(fromReference));
    }
}
