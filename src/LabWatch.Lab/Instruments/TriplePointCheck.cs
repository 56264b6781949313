using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Lab.Instruments;

/// <summary>
/// One revision of a measurement of a resistance thermometer in a triple-point-of-water cell, on the bridge that it is used with. The latest
/// one is the R(TPW) in force.
/// </summary>
/// <param name="Id">Id in the site (a slug), the same for all revisions.</param>
/// <param name="Revision">1 for the first, one more for each correction.</param>
/// <param name="Instrument">Id of the instrument.</param>
/// <param name="At">When it was measured: in force from then on.</param>
/// <param name="TriplePointOhm">R(273.16 K) with its standard uncertainty, ohm.</param>
public sealed record TriplePointCheck(string Id, int Revision, string Instrument, Instant At, Estimate TriplePointOhm)
{
    /// <summary>First instant at which the check is withdrawn: what was before stays judged by it. Null while it is not.</summary>
    public Instant? WithdrawnFrom { get; init; }
}
