using LabWatch.Lab.Sources;

namespace LabWatch.Lab.LabFile;

/// <summary>The members of a source that say what it is watched against: conditions of the room, purge, and balances learnt while it was in order.</summary>
internal static class WatchSection
{
    public static PermittedConditions? Conditions(JsonCursor source)
    {
        if (source.Object("conditions", required: false) is not { } item)
        {
            return null;
        }

        item.OnlyMembers("airCelsius", "relativeHumidityPercent", "airPressurePascal");
        return new PermittedConditions(Range(item, "airCelsius", -50, 100), Range(item, "relativeHumidityPercent", 0, 100), Range(item, "airPressurePascal", 1e3, 2e5));
    }

    public static PurgeRequirement? Purge(JsonCursor source)
    {
        if (source.Object("purge", required: false) is not { } item)
        {
            return null;
        }

        item.OnlyMembers("minimumFlowLitrePerMinute", "dewPointCelsius", "protectAboveCelsius");
        return new PurgeRequirement(
            item.Number("minimumFlowLitrePerMinute", 1e-3, 1e4),
            item.OptionalNumber("dewPointCelsius", -120, 50),
            item.OptionalNumber("protectAboveCelsius", SourceSection.LowestCelsius, SourceSection.HighestCelsius));
    }

    public static LearntBalance Balance(JsonCursor item)
    {
        item.OnlyMembers("channel", "terms", "residualDeviation", "correlation", "blocks", "range", "learntFrom", "learntUntil", "readingsDigest");
        (double minimum, double maximum) = SourceSection.Range(item) ?? (double.NaN, double.NaN);
        List<BalanceTerm> terms = [];
        foreach (JsonCursor term in item.Items("terms"))
        {
            term.OnlyMembers("kind", "coefficient");
            BalanceTerm read = new(term.Choice<BalanceTermKind>("kind"), term.Number("coefficient", -1e9, 1e9));
            if (terms.Any(other => other.Kind == read.Kind))
            {
                term.Report("repeated-id", "This term stands more than once.", "Give each kind of term once.", "kind");
            }

            terms.Add(read);
        }

        LearntBalance balance = new(
            item.Id("channel"),
            terms,
            item.Number("residualDeviation", 1e-12, 1e9),
            item.Number("correlation", 0, 0.999),
            item.PositiveInteger("blocks"),
            new PermittedRange(minimum, maximum),
            item.Time("learntFrom"),
            item.Time("learntUntil"))
        {
            ReadingsDigest = item.OptionalText("readingsDigest"),
        };
        if (balance.LearntUntil <= balance.LearntFrom)
        {
            item.Report("empty-range", "The span learnt from ends before it begins.", "Correct one of the two times.", "learntUntil");
        }

        if (terms.Count > 0 && balance.Blocks < 10 * terms.Count)
        {
            item.Report("too-few", "There are fewer than ten means for each term.", "Learn from a longer span.", "blocks");
        }

        return balance;
    }

    private static PermittedRange? Range(JsonCursor item, string name, double least, double most)
    {
        if (item.Object(name, required: false) is not { } range)
        {
            return null;
        }

        range.OnlyMembers("minimum", "maximum");
        PermittedRange read = new(range.Number("minimum", least, most), range.Number("maximum", least, most));
        if (read.Minimum >= read.Maximum)
        {
            range.Report("empty-range", "The range is empty.", "Give a maximum above the minimum.", "maximum");
        }

        return read;
    }
}
