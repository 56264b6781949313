using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Cavities;

/// <summary>
/// Gives the cavity model of a source in a band. The same geometry, view and optics give the same model bit for bit, whoever asks and
/// whether it was kept or is traced anew: criteria that use it stay pure.
/// </summary>
public interface ICavityModels
{
    /// <summary>The model. Traces on the calling thread where nobody has yet, which takes up to about a second; afterwards costs next to nothing. What is wrong with geometry, view or optics stands in its problems.</summary>
    BandModel ModelOf(ReferenceSource source, WorkingBand band);
}
