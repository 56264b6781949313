using LabWatch.Lab.Instruments;
using LabWatch.Metrology.Thermometry;

namespace LabWatch.Lab.LabFile;

/// <summary>A characteristic of the kind <c>sprt</c>: R(TPW) and one or two deviation functions of the ITS-90.</summary>
internal static class SprtSection
{
    private static readonly string[] CoefficientNames = ["a", "b", "c", "d", "c1", "c2", "c3", "c4", "c5"];

    public static SprtCharacteristic Read(JsonCursor item, double uncertainty, double factor)
    {
        SprtDeviation? below = Deviation(item.Object("below", required: false));
        SprtDeviation? above = Deviation(item.Object("above", required: false));
        if (below is null && above is null)
        {
            item.Report("missing", "A deviation function is needed.", "Add the member below (for W up to 1), above, or both.", "above");
        }

        return new SprtCharacteristic(uncertainty, factor, item.Number("triplePointOhm", 0.05, 1000), below, above);
    }

    private static SprtDeviation? Deviation(JsonCursor? member)
    {
        if (member is not { } item)
        {
            return null;
        }

        item.OnlyMembers(["subrange", "ratioAtAluminium", .. CoefficientNames]);
        SprtSubrange subrange = item.Choice<SprtSubrange>("subrange");
        IReadOnlyList<string> names = SprtSubranges.Coefficients(subrange);
        foreach (string name in CoefficientNames.Where(name => !names.Contains(name) && item.OptionalNumber(name, -1, 1) is not null))
        {
            item.Report("unknown-member", $"The subrange has no coefficient {name}.", $"Its coefficients are {string.Join(", ", names)}.", name);
        }

        double[] coefficients = [.. names.Select(name => item.Number(name, -1, 1))];
        double ratio = item.OptionalNumber("ratioAtAluminium", 3, 4) ?? double.NaN;
        return coefficients.All(double.IsFinite) ? new SprtDeviation(subrange, coefficients, ratio) : null;
    }
}
