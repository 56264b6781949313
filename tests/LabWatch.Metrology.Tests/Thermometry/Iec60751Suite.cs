using System.Globalization;
using LabWatch.Metrology.Tests.Checks;
using LabWatch.Metrology.Thermometry;

namespace LabWatch.Metrology.Tests.Thermometry;

public sealed class Iec60751Suite : CheckSuite
{
    public override string Title => "Industrial platinum resistance thermometers (IEC 60751, Callendar-Van Dusen)";

    public override string Introduction =>
        "Table values of IEC 60751 to 0.01 ohm, and the equations of its clause 4.2 both ways computed elsewhere to 50 digits.";

    protected override IEnumerable<Check> Build() => CheckRow.Read("t02_iec60751.csv").Select(Make);

    private static Check Make(CheckRow row) => row.Group switch
    {
        "tolerance_range" => Check.OfText(row, () => RangeText(ClassOf(row))),
        "tolerance_class" => Check.Of(row, () => ToleranceClasses.ToleranceKelvin(ClassOf(row), row.Number("t_C"))),
        "cvd_coefficients" => Check.Of(row, () => Coefficient(row)),
        _ when row.Has("R_ohm") => Check.Of(row, () => CharacteristicOf(row).CelsiusOf(row.Number("R_ohm"))),
        _ => Check.Of(row, () => CharacteristicOf(row).ResistanceOhm(row.Number("t_C"))),
    };

    private static CallendarVanDusen CharacteristicOf(CheckRow row) => row.Has("R0")
        ? new(row.Number("R0"), row.Number("A"), row.Number("B"), row.Number("C"))
        : CallendarVanDusen.Nominal(100);

    private static double Coefficient(CheckRow row) => row.Quantity switch
    {
        "alpha = A+100B" => CallendarVanDusen.Nominal(100).Alpha,
        "beta = -C*1e8/(A+100B)" => CallendarVanDusen.Nominal(100).Beta,
        _ => CallendarVanDusen.FromAlphaDeltaBeta(100, row.Number("alpha"), row.Number("delta"), row.Number("beta"))
            .ResistanceOhm(row.Number("t_C")),
    };

    private static ToleranceClass ClassOf(CheckRow row) => Enum.Parse<ToleranceClass>(row.Quantity.Split(' ')[^1]);

    private static string RangeText(ToleranceClass toleranceClass)
    {
        (double wireLow, double wireHigh) = ToleranceClasses.WireWoundRange(toleranceClass);
        (double filmLow, double filmHigh) = ToleranceClasses.FilmRange(toleranceClass);
        return string.Create(CultureInfo.InvariantCulture, $"{wireLow}..{wireHigh} / {filmLow}..{filmHigh}");
    }
}
