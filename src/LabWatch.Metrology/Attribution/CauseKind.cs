namespace LabWatch.Metrology.Attribution;

/// <summary>What may lie behind a deviation of radiance temperature.</summary>
public enum CauseKind
{
    /// <summary>The thermometer of a source reads wrong: the same deviation in every band.</summary>
    ThermometerError,

    /// <summary>The emissivity of a source's coating changed: a deviation that grows with the wavelength.</summary>
    CoatingEmissivity,

    /// <summary>The wall of a source is not isothermal as assumed, near the bottom: nearly the same deviation in every band; the other wells decide.</summary>
    Gradient,

    /// <summary>A comparator's signal drifted in one band: on every source that it looks at.</summary>
    ComparatorDrift,

    /// <summary>Absorption, window or purge of one source in one band.</summary>
    OneBandAbsorption,
}
