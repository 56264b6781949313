using LabWatch.Lab.Instruments;
using LabWatch.Metrology.Thermometry;

namespace LabWatch.Lab.LabFile;

/// <summary>The member <c>characteristic</c> of a certificate; its member <c>kind</c> says what else it holds.</summary>
internal static class CharacteristicSection
{
    private const string CallendarVanDusen = "callendar-van-dusen";
    private const string CorrectionTable = "correction-table";
    private const string Sprt = "sprt";
    private const string Thermocouple = "thermocouple";
    private const string PolynomialKind = "polynomial";
    private const string SakumaHattori = "sakuma-hattori";

    private static readonly CorrectionTableCharacteristic Nothing = new(double.NaN, double.NaN, []);

    public static Characteristic Read(JsonCursor certificate)
    {
        if (certificate.Object("characteristic") is not { } item)
        {
            return Nothing;
        }

        double uncertainty = item.Number("expandedUncertaintyKelvin", 1e-9, 1000);
        double factor = item.Number("coverageFactor", 1, 10);
        switch (item.Text("kind"))
        {
            case CallendarVanDusen:
                item.OnlyMembers("kind", "expandedUncertaintyKelvin", "coverageFactor", "r0Ohm", "a", "b", "c");
                return new CallendarVanDusenCharacteristic(
                    uncertainty, factor, item.Number("r0Ohm", 0.1, 100_000), item.Number("a", 1e-3, 1e-2), item.Number("b", -1e-5, 0), item.Number("c", -1e-10, 0));
            case CorrectionTable:
                item.OnlyMembers("kind", "expandedUncertaintyKelvin", "coverageFactor", "points");
                return new CorrectionTableCharacteristic(uncertainty, factor, Points(item));
            case Sprt:
                item.OnlyMembers("kind", "expandedUncertaintyKelvin", "coverageFactor", "triplePointOhm", "below", "above");
                return SprtSection.Read(item, uncertainty, factor);
            case Thermocouple:
                item.OnlyMembers("kind", "expandedUncertaintyKelvin", "coverageFactor", "type", "deviationMillivolt", "referenceJunctionCelsius");
                return new ThermocoupleCharacteristic(
                    uncertainty,
                    factor,
                    ThermocoupleTypeOf(item),
                    item.Numbers("deviationMillivolt", -1, 1, required: false),
                    item.OptionalNumber("referenceJunctionCelsius", -50, 200));
            case PolynomialKind:
                item.OnlyMembers("kind", "expandedUncertaintyKelvin", "coverageFactor", "rawUnit", "rawMinimum", "rawMaximum", "coefficients");
                return Polynomial(item, uncertainty, factor);
            case SakumaHattori:
                item.OnlyMembers("kind", "expandedUncertaintyKelvin", "coverageFactor", "rawUnit", "aMicrometre", "bMicrometreKelvin", "c");
                return new SakumaHattoriCharacteristic(
                    item.Text("rawUnit"), uncertainty, factor, item.Number("aMicrometre", 0.1, 100), item.Number("bMicrometreKelvin", -1e5, 1e5), item.Number("c", 1e-30, 1e30));
            case "":
                return Nothing;
            default:
                string kinds = string.Join(", ", CallendarVanDusen, CorrectionTable, Sprt, Thermocouple, PolynomialKind, SakumaHattori);
                item.Report("unknown-choice", "This kind of characteristic is not known.", $"Use one of: {kinds}.", "kind");
                return Nothing;
        }
    }

    private static ThermocoupleType ThermocoupleTypeOf(JsonCursor item)
    {
        string letter = item.Text("type");
        if (Enum.GetNames<ThermocoupleType>().Contains(letter) && Enum.TryParse(letter, out ThermocoupleType type))
        {
            return type;
        }

        if (letter.Length > 0)
        {
            item.Report("unknown-choice", "This type of thermocouple is not known.", $"Use one of: {string.Join(", ", Enum.GetNames<ThermocoupleType>())}.", "type");
        }

        return default;
    }

    private static PolynomialCharacteristic Polynomial(JsonCursor item, double uncertainty, double factor)
    {
        double minimum = item.Number("rawMinimum", -1e9, 1e9);
        double maximum = item.Number("rawMaximum", -1e9, 1e9);
        if (maximum <= minimum)
        {
            item.Report("empty-range", "The highest raw value is not above the lowest.", "Correct one of the two.", "rawMaximum");
        }

        return new PolynomialCharacteristic(item.Text("rawUnit"), uncertainty, factor, item.Numbers("coefficients", -1e9, 1e9), minimum, maximum);
    }

    private static CorrectionPoint[] Points(JsonCursor item)
    {
        List<CorrectionPoint> points = [];
        foreach (JsonCursor row in item.Items("points"))
        {
            row.OnlyMembers("indicatedCelsius", "correctionKelvin");
            CorrectionPoint point = new(
                row.Number("indicatedCelsius", SourceSection.LowestCelsius, SourceSection.HighestCelsius), row.Number("correctionKelvin", -100, 100));
            if (points.Count > 0 && point.IndicatedCelsius <= points[^1].IndicatedCelsius)
            {
                row.Report("not-rising", "The indications do not rise from row to row.", "Sort the rows and remove repeated ones.", "indicatedCelsius");
            }

            points.Add(point);
        }

        return [.. points];
    }
}
