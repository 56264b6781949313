using LabWatch.Metrology.Radiometry;
using LabWatch.Metrology.Tests.Checks;
using LabWatch.Metrology.Thermometry;

namespace LabWatch.Metrology.Tests.Radiometry;

public sealed class PlanckSuite : CheckSuite
{
    private const double C2 = RadiationConstants.Second;

    // The residual row without inputs belongs to the five-point fit of the rows before it.
    private CheckRow? _leastSquares;

    public override string Title => "Thermal radiation (Planck, band radiance, radiance temperature, Sakuma-Hattori)";

    public override string Introduction =>
        "Exact constants of the SI, fractions of heat-transfer handbooks, and values computed elsewhere to 50 digits by series and by quadrature.";

    protected override IEnumerable<Check> Build()
    {
        IReadOnlyList<CheckRow> rows = CheckRow.Read("t04_planck.csv");
        _leastSquares = rows.First(row => row.Group == "sakuma_hattori_lsq");
        return rows.Select(row => Check.Of(row, () => Compute(row)));
    }

    private double Compute(CheckRow row) => row.Group switch
    {
        "constants" => Constant(row.Quantity),
        "spectral_radiance" => PlanckLaw.Radiance(row.Number("lambda_um"), row.Number("T_K")) * 1e6,
        "radiance_temperature" => PlanckLaw.Temperature(row.Number("lambda_um"), row.Number("L_W_m3_sr") * 1e-6),
        "wien" => row.Unit == "Hz" ? PlanckLaw.PeakHertz(row.Number("T_K")) : PlanckLaw.PeakMicrometre(row.Number("T_K")),
        "stefan_boltzmann" => PlanckLaw.TotalExitance(row.Number("T_K")),
        "band_fraction_handbook" or "band_fraction_exact" => BlackbodyIntegral.Fraction(row.Number("lambdaT_um_K")),
        "band_fraction_inverse" => BlackbodyIntegral.ProductOfFraction(row.Number("F")),
        "band_radiance_8_14" => RadianceBand.Of(8, 14).Radiance(row.Number("t_C") + 273.15),
        "band_radiance_other" => BandOf(row).Radiance(row.Number("t_C") + 273.15),
        "eps_sensitivity_wien" => Sensitivity(row, wien: true),
        "eps_sensitivity_planck" => Sensitivity(row, wien: false),
        "radiance_T_reflected_mono" => Reflected(row, RadianceBand.At(row.Number("lambda_um"))),
        "radiance_T_reflected_8_14" => Reflected(row, BandOf(row)),
        "emissivity_correction" => ReflectedSurroundings.SurfaceTemperature(
            RadianceBand.At(row.Number("lambda_um")), row.Number("T_rad_K"), row.Number("eps"), row.Number("T_surround_K")),
        _ => SakumaHattoriValue(row),
    };

    private static double Constant(string name) => name switch
    {
        "c1L" => RadiationConstants.FirstOfRadiance,
        "c1" => RadiationConstants.First,
        "c2" => RadiationConstants.Second,
        "sigma" => RadiationConstants.StefanBoltzmann,
        "b_wavelength" => RadiationConstants.WienWavelength,
        "b_frequency" => RadiationConstants.WienFrequency,
        "x_wavelength" => RadiationConstants.WavelengthPeakRoot,
        "x_frequency" => RadiationConstants.FrequencyPeakRoot,
        _ => double.NaN,
    };

    private static RadianceBand BandOf(CheckRow row)
    {
        double[] edges = row.Numbers("band_um");
        return RadianceBand.Of(edges[0], edges[1]);
    }

    private static double Sensitivity(CheckRow row, bool wien) =>
        PlanckLaw.EmissivitySensitivity(row.Number("lambda_um"), row.Number("T_K"), wien) * row.Number("rel_deps");

    private static double Reflected(CheckRow row, RadianceBand band) =>
        ReflectedSurroundings.Evaluate(band, row.Number("T_K"), row.Number("eps"), row.Number("T_surround_K")).Kelvin - row.Number("T_K");

    private double SakumaHattoriValue(CheckRow row) => row.Group switch
    {
        "sakuma_hattori_params" => OfBand(row),
        "sakuma_hattori_eval" => Evaluation(row),
        "sakuma_hattori_fit3" => Fitted(row),
        "sakuma_hattori_lsq" when row.Has("T_K") => Parameter(FitOf(row, "signal").Characteristic, row.Quantity),
        "sakuma_hattori_lsq" => FitOf(_leastSquares!, "signal").RmsKelvin,
        _ => double.NaN,
    };

    private static double OfBand(CheckRow row)
    {
        double[] edges = row.Numbers("band_um");
        return Parameter(SakumaHattori.OfBand(edges[0], edges[1], 1, C2), row.Quantity);
    }

    private static double Evaluation(CheckRow row)
    {
        SakumaHattori equation = new(row.Number("A_um"), row.Number("B_umK"), row.Number("C"), C2);
        return row.Quantity[..4] switch
        {
            "S(T)" => equation.Signal(row.Number("T_K")),
            "dS/d" => equation.SignalSlope(row.Number("T_K")),
            _ => equation.Kelvin(row.Number("S")),
        };
    }

    private static double Fitted(CheckRow row)
    {
        if (!row.Has("T_fit_K"))
        {
            return Parameter(FitOf(row, "signal_W_m2_sr").Characteristic, row.Quantity);
        }

        double[] kelvin = row.Numbers("T_fit_K");
        SakumaHattori fit = SakumaHattoriFit.To(kelvin, [.. kelvin.Select(Exact)], 9.36, C2).Characteristic;
        return fit.Kelvin(Exact(row.Number("T_K"))) - row.Number("T_K");

        static double Exact(double t) => BlackbodyIntegral.BandRadiance(8, 14, t);
    }

    private static SakumaHattoriFit FitOf(CheckRow row, string signals) => SakumaHattoriFit.To(row.Numbers("T_K"), row.Numbers(signals), 9.36, C2);

    private static double Parameter(SakumaHattori equation, string quantity) => quantity[0] switch
    {
        'A' => equation.AMicrometre,
        'B' => equation.BMicrometreKelvin,
        'C' => equation.C,
        _ => double.NaN,
    };
}
