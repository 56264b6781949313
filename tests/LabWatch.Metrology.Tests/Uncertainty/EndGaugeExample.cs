using LabWatch.Metrology.Tests.Checks;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Metrology.Tests.Uncertainty;

/// <summary>
/// JCGM 100:2008, annex H.1: length l = l_s + d - l_s (delta_alpha theta + alpha_s delta_theta) of an end gauge, lengths in nanometre.
/// </summary>
internal sealed class EndGaugeExample
{
    /// <summary>u(alpha_s) = 2e-6 / sqrt(3), H.1.3.3.</summary>
    private const double ExpansionUncertainty = 1.2e-6;

    private readonly double _standard;
    private readonly double _difference;

    public EndGaugeExample(CheckRow row)
    {
        _standard = row.Number("ls_mm") * 1e6;
        _difference = row.Number("dbar_nm");
        MeanDifference = row.Number("s_pooled_nm") / Math.Sqrt(row.Number("n"));
        Difference = new(
        [
            new("mean of repeated observations", new(0, MeanDifference, row.Number("nu_pooled")), 1),
            new("comparator, random", new(0, row.Number("u_d1_nm"), row.Number("nu_d1")), 1),
            new("comparator, systematic", new(0, row.Number("u_d2_nm"), row.Number("nu_d2")), 1),
        ]);
        TemperatureDifference = row.Number("half_width_delta_theta_C") / Math.Sqrt(3);

        // Mean deviation of the bench 0.2 degC, cyclic variation of amplitude 0.5 degC with an arcsine distribution (H.1.3.4).
        Temperature = double.Hypot(0.2, 0.5 / Math.Sqrt(2));
        double expansionDifference = row.Number("half_width_delta_alpha") / Math.Sqrt(3);
        Budget = new(
        [
            new("standard", new(_standard, row.Number("u_ls_nm"), row.Number("nu_ls")), 1),
            new("difference", Difference.Combined, 1),
            new("difference of expansion", new(0, expansionDifference, row.Number("nu_dalpha")), -_standard * row.Number("theta_bar_C")),
            new("difference of temperature", new(0, TemperatureDifference, row.Number("nu_dtheta")), -_standard * row.Number("alpha_S")),
        ]);
        double first = _standard * expansionDifference * Temperature;
        double second = _standard * ExpansionUncertainty * TemperatureDifference;
        WithSecondOrder = double.Hypot(Budget.Combined.StandardUncertainty, double.Hypot(first, second));
    }

    /// <summary>c(alpha_s) = -l_s delta_theta = 0, the difference of temperature being zero at its estimate.</summary>
    public static double SensitivityToExpansion => 0;

    /// <summary>c(theta) = -l_s delta_alpha = 0, the difference of expansion being zero at its estimate.</summary>
    public static double SensitivityToTemperature => 0;

    public double MeanDifference { get; }

    public UncertaintyBudget Difference { get; }

    public double TemperatureDifference { get; }

    public double Temperature { get; }

    public UncertaintyBudget Budget { get; }

    public double WithSecondOrder { get; }

    public double LengthMillimetre => (_standard + _difference) * 1e-6;
}
