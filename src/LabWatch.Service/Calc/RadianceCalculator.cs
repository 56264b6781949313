using LabWatch.Metrology.Radiometry;
using LabWatch.Metrology.Thermometry;

namespace LabWatch.Service.Calc;

/// <summary>Radiance, radiance temperature and effective emissivity in a band, with reflected surroundings.</summary>
internal sealed class RadianceCalculator : Calculator
{
    private const double Offset = Its90.CelsiusOffset;

    public override string Name => "radiance";

    public override string Summary => "Radiance and radiance temperature of a surface or cavity in a band, its temperature from them, or the emissivity that explains both.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "one wavelength: L = c1L / (lambda^5 (exp(c2/(lambda T)) - 1)); a band: its integral between the edges, uniform response",
        "seen: L(T_rad) = e L(T) + (1 - e) L(T_bg)",
        "from both: e = (L(T_rad) - L(T_bg)) / (L(T) - L(T_bg))",
        "u: derivatives by temperature, emissivity and background, in quadrature",
    ];

    public override IReadOnlyList<string> Source { get; } =
    [
        "Planck's law with the exact SI constants (SI Brochure, 9th edition)",
        "band integral: series of the blackbody fraction, Siegel and Howell, appendix A",
    ];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Number("wavelength_um", "one wavelength, micrometre; give this or lower_um and upper_um").Optional() with { Minimum = 0.1, Maximum = 1000 },
        CalcField.Number("lower_um", "lower edge of the band, micrometre").Optional() with { Minimum = 0.1, Maximum = 1000 },
        CalcField.Number("upper_um", "upper edge of the band, micrometre").Optional() with { Minimum = 0.1, Maximum = 1000 },
        CalcField.Celsius("t_c", "temperature of the surface, degree Celsius").Optional(),
        CalcField.Celsius("t_rad_c", "radiance temperature seen, degree Celsius").Optional(),
        CalcField.Positive("emissivity", "emissivity; 1 where missing").Optional() with { Maximum = 1 },
        CalcField.Celsius("background_c", "temperature of the surroundings, degree Celsius; none where missing").Optional(),
        CalcField.NotNegative("u_t_k", "standard uncertainty of t_c, kelvin; 0 where missing").Optional(),
        CalcField.NotNegative("u_t_rad_k", "standard uncertainty of t_rad_c, kelvin; 0 where missing").Optional(),
        CalcField.NotNegative("u_emissivity", "standard uncertainty of the emissivity; 0 where missing").Optional(),
        CalcField.NotNegative("u_background_k", "standard uncertainty of background_c, kelvin; 0 where missing").Optional(),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("radiance", "radiance seen: W m^-2 sr^-1 um^-1 at one wavelength, W m^-2 sr^-1 in a band"),
        ("t_c", "temperature of the surface, degree Celsius"),
        ("u_t_k", "its standard uncertainty, kelvin"),
        ("t_rad_c", "radiance temperature, degree Celsius"),
        ("u_t_rad_k", "its standard uncertainty, kelvin"),
        ("emissivity", "emissivity"),
        ("u_emissivity", "its standard uncertainty"),
        ("difference_k", "radiance temperature minus temperature, kelvin"),
        ("dtrad_dt", "derivative of the radiance temperature by the temperature"),
        ("dtrad_demissivity_k", "derivative by the emissivity, kelvin per unit"),
        ("dtrad_dbackground", "derivative by the temperature of the surroundings"),
    ];

    public override string Example => """{ "lower_um": 8, "upper_um": 14, "t_c": 300, "u_t_k": 0.05, "emissivity": 0.995, "u_emissivity": 0.001, "background_c": 23, "u_background_k": 2 }""";

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        if (BandOf(input) is not { } band)
        {
            return;
        }

        double background = input.Has("background_c") ? input.Number("background_c") + Offset : 0;
        double emissivity = input.Number("emissivity", 1);
        bool hasBoth = input.Has("t_c") && input.Has("t_rad_c");
        double kelvin = input.Number("t_c") + Offset;
        double seen = input.Number("t_rad_c") + Offset;
        if (hasBoth)
        {
            emissivity = ReflectedSurroundings.EffectiveEmissivity(band, seen, kelvin, background);
        }
        else if (input.Has("t_rad_c"))
        {
            kelvin = ReflectedSurroundings.SurfaceTemperature(band, seen, emissivity, background);
        }

        RadianceTemperature at = ReflectedSurroundings.Evaluate(band, kelvin, emissivity, background);
        if (!double.IsFinite(at.Kelvin))
        {
            input.Reject("no-radiance", string.Empty, "No temperature or emissivity explains this.", "Check emissivity, temperatures and surroundings.");
            return;
        }

        (double ut, double urad, double ue) = Uncertainties(input, at, hasBoth);
        result.Add("radiance", band.Radiance(at.Kelvin))
            .Add("t_c", kelvin - Offset).Add("u_t_k", ut)
            .Add("t_rad_c", at.Kelvin - Offset).Add("u_t_rad_k", urad)
            .Add("emissivity", emissivity).Add("u_emissivity", ue)
            .Add("difference_k", at.Kelvin - kelvin)
            .Add("dtrad_dt", at.PerSurfaceKelvin)
            .Add("dtrad_demissivity_k", at.PerEmissivity)
            .Add("dtrad_dbackground", at.PerBackgroundKelvin)
            .Step("radiance_of_t", band.Radiance(kelvin))
            .Step("radiance_of_background", background > 0 ? band.Radiance(background) : 0);
    }

    /// <summary>Uncertainty of whatever was computed; of what was given it is as given.</summary>
    private static (double Temperature, double Radiance, double Emissivity) Uncertainties(CalcInput input, RadianceTemperature at, bool hasBoth)
    {
        double ut = input.Number("u_t_k", 0);
        double urad = input.Number("u_t_rad_k", 0);
        double ue = input.Number("u_emissivity", 0);
        double fromBackground = at.PerBackgroundKelvin * input.Number("u_background_k", 0);
        if (hasBoth)
        {
            return (ut, urad, double.Hypot(double.Hypot(urad, at.PerSurfaceKelvin * ut), fromBackground) / Math.Abs(at.PerEmissivity));
        }

        double fromEmissivity = at.PerEmissivity * ue;
        return input.Has("t_c")
            ? (ut, double.Hypot(double.Hypot(at.PerSurfaceKelvin * ut, fromEmissivity), fromBackground), ue)
            : (double.Hypot(double.Hypot(urad, fromEmissivity), fromBackground) / at.PerSurfaceKelvin, urad, ue);
    }

    private static RadianceBand? BandOf(CalcInput input)
    {
        bool isOne = input.Has("wavelength_um");
        bool isBand = input.Has("lower_um") && input.Has("upper_um");
        if (isOne == isBand || !(input.Has("t_c") || input.Has("t_rad_c")))
        {
            input.Reject("one-of", string.Empty, "wavelength_um, or lower_um with upper_um, is needed, and t_c or t_rad_c.", "See --example.");
            return null;
        }

        double lower = isOne ? input.Number("wavelength_um") : input.Number("lower_um");
        double upper = isOne ? lower : input.Number("upper_um");
        if (upper < lower)
        {
            input.Reject("empty-range", "upper_um", "The upper edge is below the lower one.", "Exchange them.");
            return null;
        }

        return RadianceBand.Of(lower, upper);
    }
}
