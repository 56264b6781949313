namespace LabWatch.Metrology.Cavities;

/// <summary>The method that made a result.</summary>
public enum CavityMethod
{
    /// <summary>A closed form (sphere, flat plate).</summary>
    ClosedForm,

    /// <summary>The integral equation of the radiosity with ring kernels, for diffuse walls.</summary>
    IntegralEquation,

    /// <summary>Backward tracing of rays with scrambled Sobol points.</summary>
    MonteCarlo,
}
