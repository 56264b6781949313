namespace LabWatch.Metrology.Radiometry;

/// <summary>
/// Constants of thermal radiation, from the exact values of h, c and k that define the SI since 2019 (SI Brochure, 9th edition; CODATA 2018).
/// </summary>
public static class RadiationConstants
{
    /// <summary>Planck constant h, J s, exact.</summary>
    public const double Planck = 6.62607015e-34;

    /// <summary>Speed of light in vacuum c, m/s, exact.</summary>
    public const double SpeedOfLight = 299792458;

    /// <summary>Boltzmann constant k, J/K, exact.</summary>
    public const double Boltzmann = 1.380649e-23;

    /// <summary>First radiation constant c1 = 2 pi h c^2, W m^2.</summary>
    public const double First = Math.PI * FirstOfRadiance;

    /// <summary>First radiation constant for spectral radiance c1L = 2 h c^2, W m^2 / sr.</summary>
    public const double FirstOfRadiance = 2 * Planck * SpeedOfLight * SpeedOfLight;

    /// <summary>Second radiation constant c2 = h c / k, m K.</summary>
    public const double Second = Planck * SpeedOfLight / Boltzmann;

    /// <summary>
    /// Second radiation constant by which the ITS-90 defines t90 above the silver point, m K (Preston-Thomas 1990, equation 15). It is not
    /// <see cref="Second"/>: mixing them is wrong by 9 mK at 1500 degC and 76 mK at 3000 degC.
    /// </summary>
    public const double SecondOfIts90 = 0.014388;

    /// <summary>Stefan-Boltzmann constant sigma = 2 pi^5 k^4 / (15 h^3 c^2), W m^-2 K^-4.</summary>
    public const double StefanBoltzmann =
        2 * Math.PI * Math.PI * Math.PI * Math.PI * Math.PI / 15
        * (Boltzmann / Planck) * (Boltzmann / SpeedOfLight) * (Boltzmann / Planck) * (Boltzmann / (Planck * SpeedOfLight));

    /// <summary>Root of x = 5 (1 - exp(-x)): x = c2 / (lambda T) at the maximum of spectral radiance by wavelength.</summary>
    public const double WavelengthPeakRoot = 4.9651142317442763037;

    /// <summary>Root of x = 3 (1 - exp(-x)): x = h nu / (k T) at the maximum of spectral radiance by frequency.</summary>
    public const double FrequencyPeakRoot = 2.8214393721220788934;

    /// <summary>Wien's displacement constant b by wavelength, m K.</summary>
    public const double WienWavelength = Second / WavelengthPeakRoot;

    /// <summary>Wien's displacement constant b' by frequency, Hz/K.</summary>
    public const double WienFrequency = FrequencyPeakRoot * Boltzmann / Planck;
}
