using LabWatch.Lab.Instruments;
using LabWatch.Metrology.Thermometry;

namespace LabWatch.Lab.LabFile;

/// <summary>The member <c>characteristic</c> of a certificate; its member <c>kind</c> says what else it holds.</summary>
internal static class CharacteristicSection
{
    private const string CallendarVanDusen = "callendar-van-dusen";
    private const string CorrectionTable = "correction-table";

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
            case "":
                return Nothing;
            default:
                item.Report("unknown-choice", "This kind of characteristic is not known.", $"Use one of: {CallendarVanDusen}, {CorrectionTable}.", "kind");
                return Nothing;
        }
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
