using LabWatch.Lab.Identity;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.Limits;

/// <summary>One revision of the largest permitted magnitude of a criterion's value for a source.</summary>
/// <param name="Id">Id in the site (a slug), the same for all revisions.</param>
/// <param name="Revision">1 for the first, one more for each change.</param>
/// <param name="Source">The source it applies to.</param>
/// <param name="Criterion">One of <see cref="CriterionCode"/>.</param>
/// <param name="Maximum">Largest permitted value, in <paramref name="Unit"/>, positive.</param>
/// <param name="Unit">Unit of the value (SenML name; mK and K for temperature differences).</param>
/// <param name="Rule">How the decision is taken.</param>
/// <param name="EffectiveFrom">First instant at which this revision applies.</param>
public sealed record AcceptanceLimit(
    string Id, int Revision, SourceKey Source, string Criterion, double Maximum, string Unit, DecisionRule Rule, Instant EffectiveFrom)
{
    /// <summary>Lowest set point it applies to, degree Celsius; null where open.</summary>
    public double? MinimumCelsius { get; init; }

    /// <summary>Highest set point it applies to, degree Celsius; null where open.</summary>
    public double? MaximumCelsius { get; init; }

    /// <summary>Working band it applies to; null for all.</summary>
    public string? Band { get; init; }

    /// <summary>First instant at which the limit is withdrawn: what was before stays judged by it. Null while it is not.</summary>
    public Instant? WithdrawnFrom { get; init; }
}
