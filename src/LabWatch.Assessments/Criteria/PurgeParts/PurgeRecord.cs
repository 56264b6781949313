using LabWatch.Assessments.Criteria.Verdicts;
using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Criteria.PurgeParts;

/// <summary>What the purge did over window and lead-in.</summary>
/// <param name="Source">The source.</param>
/// <param name="Within">Moments of the window.</param>
/// <param name="Worst">The one with the dampest coldest wall; null where none is known.</param>
/// <param name="FrostStands">Whether frost came in window or lead-in, and nothing has shown since that it is gone.</param>
/// <param name="Obstacles">Why nothing can be decided, apart from the limit.</param>
internal sealed record PurgeRecord(ReferenceSource Source, IReadOnlyList<PurgeMoment?> Within, PurgeMoment? Worst, bool FrostStands, IReadOnlyList<string> Obstacles)
{
    /// <summary>The dew or frost point has to be this far below the coldest wall, kelvin (common practice, no source).</summary>
    public const double MarginKelvin = 2;

    /// <summary>Walls that stood above this are free of ice, degree Celsius.</summary>
    private const double MeltedCelsius = 2;
    private const double LeastPart = 0.8;

    /// <summary>What fails whatever the limit, each as a clause.</summary>
    public IReadOnlyList<string> Breaches => [.. Condensation().Concat(Oxygen()).Concat(Frost())];

    public static PurgeRecord Of(CriterionInput input, CriterionSchedule schedule)
    {
        IReadOnlyList<PurgeMoment?> all = new PurgeReader(input, schedule.SpanOf(input.Window)).Read();
        int within = (int)(input.Window.Duration / PurgeReader.Block);
        IReadOnlyList<PurgeMoment?> window = [.. all.Skip(all.Count - within)];
        List<PurgeMoment> known = [.. window.OfType<PurgeMoment>().Where(moment => moment.Humidity.HasValue)];
        List<string> obstacles = [];
        if (known.Count < LeastPart * within)
        {
            obstacles.Add($"coldest wall and dew point of the gas are known in {Quantities.Count(known.Count)} of {Quantities.Count(within)} parts of the window");
        }

        return new(input.Source, window, known.MaxBy(moment => moment.Humidity.Value), Stands(all), obstacles);
    }

    private static bool Stands(IReadOnlyList<PurgeMoment?> moments)
    {
        bool frost = false;
        foreach (PurgeMoment moment in moments.OfType<PurgeMoment>())
        {
            frost = moment.Frosts || (frost && !(moment.Wall.Value > MeltedCelsius && moment.ExcessKelvin <= -MarginKelvin));
        }

        return frost;
    }

    private IEnumerable<string> Condensation()
    {
        if (Worst is { } worst && worst.ExcessKelvin > -MarginKelvin)
        {
            yield return worst.ExcessKelvin >= 0
                ? $"the gas is saturated at the coldest wall ({worst.WallChannel}): water settles there"
                : $"the dew or frost point lies only {Quantities.Significant(-worst.ExcessKelvin)} K below the coldest wall ({worst.WallChannel}), and {VerdictText.Plain(MarginKelvin)} K are asked for";
        }
    }

    private IEnumerable<string> Oxygen()
    {
        if (Source.Purge is not { ProtectAboveCelsius: { } limit } purge)
        {
            yield break;
        }

        int bare = Within.OfType<PurgeMoment>().Count(moment => moment.HottestCelsius > limit && moment.FlowLitrePerMinute < purge.MinimumFlowLitrePerMinute);
        if (bare > 0)
        {
            yield return $"the cavity was above {VerdictText.Plain(limit)} degC with less than {VerdictText.Plain(purge.MinimumFlowLitrePerMinute)} l/min of purge for {Quantities.Duration(bare * PurgeReader.Block)}, "
                + "and oxygen damages it there";
        }
    }

    private IEnumerable<string> Frost()
    {
        if (FrostStands)
        {
            yield return "frost may stand on the walls: warm the cavity above 2 degC in dry gas, and check it";
        }
    }
}
