using LabWatch.Lab.Identity;
using LabWatch.Lab.Limits;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.LabFile;

/// <summary>One entry of the member <c>limits</c> of a lab file.</summary>
internal static class LimitSection
{
    public static AcceptanceLimit Read(JsonCursor item, string site)
    {
        item.OnlyMembers("id", "revision", "source", "criterion", "maximum", "unit", "rule", "effectiveFrom", "range", "band");
        string criterion = item.Text("criterion");
        if (criterion.Length > 0 && !CriterionCode.All.Contains(criterion, StringComparer.Ordinal))
        {
            item.Report("unknown-choice", "This criterion is not known.", $"Use one of: {string.Join(", ", CriterionCode.All)}.", "criterion");
        }

        string unit = item.Text("unit");
        IReadOnlyList<string> units = LimitUnits.Of(criterion);
        if (unit.Length > 0 && units.Count > 0 && !units.Contains(unit, StringComparer.Ordinal))
        {
            item.Report("unit-mismatch", $"The criterion {criterion} gives no value in this unit.", $"Use one of: {string.Join(", ", units)}.", "unit");
        }

        (double Minimum, double Maximum)? range = SourceSection.Range(item, required: false);
        return new AcceptanceLimit(
            item.Id("id"),
            item.PositiveInteger("revision"),
            new SourceKey(site, item.Id("source")),
            criterion,
            item.Number("maximum", 1e-12, 1e12),
            unit,
            item.Choice<DecisionRule>("rule"),
            item.Time("effectiveFrom"))
        {
            MinimumCelsius = range?.Minimum,
            MaximumCelsius = range?.Maximum,
            Band = item.OptionalText("band"),
        };
    }
}
