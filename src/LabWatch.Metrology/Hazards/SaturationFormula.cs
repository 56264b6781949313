namespace LabWatch.Metrology.Hazards;

/// <summary>Formulas for the saturation vapour pressure of water; pure phase, no enhancement factor. Coefficients from memory, confirmed by each other.</summary>
public enum SaturationFormula
{
    /// <summary>D. Sonntag, Z. Meteorol. 40 (1990) 340.</summary>
    Sonntag,

    /// <summary>WMO No. 8 (CIMO guide), annex 4.B: the Magnus form.</summary>
    Wmo,

    /// <summary>R. W. Hyland and A. Wexler, ASHRAE Trans. 89 (1983) 500.</summary>
    HylandWexler,

    /// <summary>B. Hardy, ITS-90 formulations, Third International Symposium on Humidity and Moisture (1998).</summary>
    Hardy,
}
