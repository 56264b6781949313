using LabWatch.Metrology.Tests.Checks;
using LabWatch.Metrology.Thermometry;

namespace LabWatch.Metrology.Tests.Thermometry;

public sealed class ThermocoupleSuite : CheckSuite
{
    public override string Title => "Thermocouples (IEC 60584-1 = NIST Monograph 175)";

    public override string Introduction =>
        "Table values to 1 uV, the reference functions, their slopes and exact inverses computed elsewhere to 50 digits, and cold junctions.";

    protected override IEnumerable<Check> Build() => CheckRow.Read("t03_thermocouples.csv").Select(row => Check.Of(row, () => Compute(row)));

    private static double Compute(CheckRow row)
    {
        ThermocoupleReference reference = ThermocoupleReference.Of(Enum.Parse<ThermocoupleType>(row.Text("type")));
        return row.Group switch
        {
            "seebeck" => reference.SlopeMillivoltPerKelvin(row.Number("t_C")) * 1000,
            "continuity" => reference.StepMillivolt(row.Number("t_C")) * 1000,
            "cold_junction" => new Thermocouple(reference.Type, []).CelsiusOf(row.Number("E_measured_mV"), row.Number("t_ref_C")),
            "type_B_minimum" => row.Unit == "uV" ? reference.EmfMillivolt(MinimumOfTypeB(reference)) * 1000 : SecondZeroOfTypeB(reference),
            _ when row.Has("E_mV") => reference.CelsiusOf(row.Number("E_mV")),
            _ => reference.EmfMillivolt(row.Number("t_C")),
        };
    }

    private static double MinimumOfTypeB(ThermocoupleReference reference) => Root(reference.SlopeMillivoltPerKelvin, 1, 40);

    private static double SecondZeroOfTypeB(ThermocoupleReference reference) => Root(reference.EmfMillivolt, 30, 60);

    private static double Root(Func<double, double> rising, double low, double high)
    {
        for (int step = 0; step < 80; step++)
        {
            double middle = 0.5 * (low + high);
            (low, high) = rising(middle) < 0 ? (middle, high) : (low, middle);
        }

        return low;
    }
}
