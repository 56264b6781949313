using LabWatch.Assessments;
using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Criteria;
using LabWatch.Assessments.Profiles;
using LabWatch.Lab;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Assessments.Cavities;

/// <summary>Numbers that a temperature laboratory knows, and properties, of the profile's evaluation.</summary>
public sealed class RadianceNumbersTests
{
    // First-order size of -0.5 % in emissivity, 8 to 14 um, surroundings at 23 degC: dT = (lambda T^2/c2)(1 - exp(-c2/(lambda T)))(1 - L(T_bg)/L(T)) de/e, common practice;
    // two digits are given, the exact computation differs by less than the last one.
    [Theory]
    [InlineData(-20, 0.28)]
    [InlineData(23, 0)]
    [InlineData(50, -0.12)]
    [InlineData(300, -0.96)]
    public void Half_a_percent_of_emissivity_moves_the_radiance_temperature_as_a_plate_shows(double celsius, double kelvin)
    {
        CavityLab lab = new()
        {
            Cavity = new(CavityShape.FlatPlate, 50, 0, null, 50, [new("8-14", new(0.995, 0), new(1, 0))]),
            SetPoint = celsius,
            Bottom = celsius,
            Middle = celsius,
            Front = celsius,
            Lip = celsius,
        };
        CriterionResult result = lab.Evaluate(new EffectiveEmissivityCriterion(EffectiveEmissivityCriterion.DefaultSchedule, DemoRun.Models))[0];
        Assert.Equal(0.995, CriterionResult.Figure(result.Figures, "effective-emissivity"), 1e-12);
        Assert.Equal(kelvin, CriterionResult.Figure(result.Figures, "radiance-temperature-offset") / 1000, 0.006);
    }

    [Fact]
    public void Fifty_millikelvin_of_a_comparator_leave_four_parts_in_a_thousand_at_37_degrees()
    {
        // u(T_rad) = 0.05 K gives u(e_eff) = 3.8e-3 at 37 degC, 8 to 14 um, surroundings 23 degC (common practice: dL/dT u / (L(37) - L(23))).
        CavityLab lab = new() { SetPoint = 37, Bottom = 37, Middle = 37, Front = 37, Lip = 37, Comparator = 37, WellUncertainty = 1e-6, ComparatorUncertainty = 0.05, EmissivityLimit = 0.02 };
        CriterionResult result = lab.Evaluate(new EffectiveEmissivityCriterion(EffectiveEmissivityCriterion.DefaultSchedule, DemoRun.Models))[1];
        Assert.Equal(3.8e-3, result.Figures.Single(figure => figure.Name == "comparator-emissivity").Value.StandardUncertainty, 0.06e-3);
    }

    [Fact]
    public void Without_temperature_differences_model_and_isothermal_value_are_one() =>
        Each(random =>
        {
            double celsius = -40 + (random.NextDouble() * 1500);
            AxialEvidence evidence = Evidence(new CavityLab { Bottom = celsius, Middle = celsius, Front = celsius, Lip = celsius, Ambient = celsius });
            BandRadiance radiance = BandRadianceEvaluation.Of(Model(), evidence)!;
            Assert.Equal(radiance.Values.Isothermal, radiance.Values.EffectiveEmissivity, 1e-12);
            Assert.Equal(0, radiance.Values.OffsetKelvin, 1e-7);
        });

    [Fact]
    public void The_radiance_lies_between_those_of_a_cavity_as_cold_and_as_warm_as_any_of_its_places() =>
        Each(random =>
        {
            CavityLab lab = AnyLab(random);
            BandRadiance radiance = BandRadianceEvaluation.Of(Model(), Evidence(lab))!;
            double[] places = [lab.Bottom, lab.Middle, lab.Front, lab.Lip];
            double Ratio(double celsius) => radiance.Values.Isothermal * radiance.Model.Radiance.Radiance(celsius + 273.15) / radiance.Values.ReferenceRadiance;
            Assert.InRange(radiance.Values.EffectiveEmissivity, Ratio(places.Min()) - 1e-12, Ratio(places.Max()) + 1e-12);
        });

    [Fact]
    public void A_comparator_that_reads_what_the_model_says_gives_the_effective_emissivity_of_the_model() =>
        Each(random =>
        {
            CavityLab lab = AnyLab(random);
            AxialEvidence evidence = Evidence(lab);
            BandRadiance radiance = BandRadianceEvaluation.Of(Model(), evidence)!;
            ComparatorPoint point = evidence.Comparators[0] with { Celsius = new(radiance.Values.RadianceKelvin - 273.15, 0.1), Refusal = null };
            ComparatorEmissivity found = ComparatorEmissivity.Of(radiance, point)!;
            double condition = radiance.Values.ReferenceRadiance / Math.Abs(radiance.Values.ReferenceRadiance - radiance.Values.BackgroundRadiance);
            Assert.Equal(radiance.Values.EffectiveEmissivity, found.EffectiveEmissivity.Value, 1e-10 * condition);

            // Both published formulas hold at once: the isothermal one without a profile, the other with the reflected part that follows from the value.
            double reflected = 1 - radiance.Values.Deficit - found.EffectiveEmissivity.Value;
            double seen = radiance.Model.Radiance.Radiance(radiance.Values.RadianceKelvin);
            Assert.Equal(
                found.EffectiveEmissivity.Value, (seen - (reflected * radiance.Values.BackgroundRadiance)) / radiance.Values.ReferenceRadiance, 1e-10 * condition);
        });

    [Fact]
    public void The_wall_stays_between_the_temperatures_around_it() =>
        Each(random =>
        {
            CavityLab lab = AnyLab(random);
            SourceProfile profile = Live(lab);
            double low = new[] { lab.Bottom, lab.Middle, lab.Front, lab.Lip }.Min(), high = new[] { lab.Bottom, lab.Middle, lab.Front, lab.Lip }.Max();
            Assert.All(profile.Curve, point => Assert.InRange(point.Celsius, low - 1e-9, high + 1e-9));
            Assert.Equal(lab.Lip, profile.Curve[0].Celsius, 1e-9);
            Assert.Equal(lab.Bottom, profile.Curve[^1].Celsius, 1e-9);
        });

    [Fact]
    public void Propagation_of_distributions_gives_the_same_uncertainty_as_the_derivatives()
    {
        // JCGM 101:2008: draws of every input, each time the whole model anew; 4000 draws leave 1.1 % of the standard deviation.
        CavityLab lab = new() { WellUncertainty = 0.05, Cavity = new CavityLab().Cavity with { Coating = [new("8-14", new(0.94, 0.004), new(1, 0))] } };
        AxialEvidence evidence = Evidence(lab);
        BandModel model = DemoRun.Models.ModelOf(evidence.Source, evidence.Source.Bands[0]);
        BandRadiance radiance = BandRadianceEvaluation.Of(model, evidence)!;
        List<double> emissivities = [], kelvins = [];
        Random random = new(4711);
        for (int draw = 0; draw < 4000; draw++)
        {
            BandModel drawn = model with { Weights = model.Weights!.Counts.Weights(0.94 + (0.004 * Normal(random))), Sides = [] };
            double drop = 1e-4 * Normal(random), around = evidence.Surroundings.RadianceCelsius.Value + (evidence.Surroundings.RadianceCelsius.StandardUncertainty * Normal(random));
            WellPoint[] wells = [.. evidence.Wells.Select(well => well with { Celsius = well.Celsius + (well.StandardUncertainty * Normal(random)) })];
            AxialEvidence moved = evidence with
            {
                Source = evidence.Source with { WellToWallDrop = new(drop, 0) },
                Wells = wells,
                Reference = wells[0],
                Lip = evidence.Lip! with { Celsius = evidence.Lip.Celsius + (evidence.Lip.StandardUncertainty * Normal(random)) },
                Surroundings = evidence.Surroundings with { RadianceCelsius = new(around, 0) },
            };
            BandRadiance result = BandRadianceEvaluation.Of(drawn, moved)!;
            emissivities.Add(result.Values.EffectiveEmissivity);
            kelvins.Add(result.Values.RadianceKelvin);
        }

        Assert.Equal(1, Deviation(emissivities) / Combined(radiance, change => change.EffectiveEmissivity), 0.05);
        Assert.Equal(1, Deviation(kelvins) / Combined(radiance, change => change.RadianceKelvin), 0.05);
        Assert.Equal(radiance.Values.EffectiveEmissivity, emissivities.Average(), 4 * Deviation(emissivities) / Math.Sqrt(4000) + 1e-5);
    }

    [Fact]
    public void Batch_means_see_noise_and_drift()
    {
        TimeWindow window = new(CavityLab.Noon, CavityLab.Noon + TimeSpan.FromMinutes(30));
        long[] times = [.. Enumerable.Range(0, 180).Select(i => (window.Start + TimeSpan.FromSeconds(10 * i)).Microseconds)];

        // A ramp of 1 K over the window: six means a sixth apart have a standard deviation of sqrt(3.5)/6, and that over sqrt(6) is 0.12729.
        Assert.Equal(Math.Sqrt(3.5) / 6 / Math.Sqrt(6), BatchMeans.StandardError(times, [.. Enumerable.Range(0, 180).Select(i => i / 180.0)], window), 1e-12);
        Assert.Equal(0, BatchMeans.StandardError(times, new double[180], window));
        Assert.True(double.IsNaN(BatchMeans.StandardError(times.AsSpan(0, 100), new double[100], window)));
    }

    private static void Each(Action<Random> check)
    {
        for (int seed = 0; seed < 100; seed++)
        {
            check(new Random(seed));
        }
    }

    private static CavityLab AnyLab(Random random)
    {
        double bottom = 60 + (random.NextDouble() * 500);
        return new()
        {
            SetPoint = bottom,
            Bottom = bottom,
            Middle = bottom - (3 * random.NextDouble()) + 1,
            Front = bottom - (10 * random.NextDouble()) + 1,
            Lip = 25 + ((bottom - 25) * random.NextDouble()),
        };
    }

    private static AxialEvidence Evidence(CavityLab lab)
    {
        TimeWindow window = new(CavityLab.Noon, CavityLab.Noon + TimeSpan.FromMinutes(30));
        LabSnapshot snapshot = lab.Snapshot();
        ReferenceSource source = snapshot.Sources[0] with { SurroundingsOffsetKelvin = new(0, 1) };
        AxialEvidence evidence = AxialReader.Read(snapshot, source, window, lab.Readings(window), leastCoverage: 0);

        // Ranges of certificates are not the matter here.
        return evidence.Obstacles.Count == 0 ? evidence : Wide(lab, window);
    }

    private static AxialEvidence Wide(CavityLab lab, TimeWindow window)
    {
        LabSnapshot snapshot = lab.Snapshot();
        LabSnapshot wide = new(
            snapshot.Site, snapshot.Sources, snapshot.Instruments, snapshot.Installations,
            [.. snapshot.Certificates.Select(certificate => certificate with
            {
                MinimumCelsius = -200,
                MaximumCelsius = 3000,
                Characteristic = new CorrectionTableCharacteristic(certificate.Characteristic.ExpandedUncertaintyKelvin, 2, [new(-200, 0), new(3000, 0)]),
            })],
            snapshot.Limits, []);
        return AxialReader.Read(wide, wide.Sources[0], window, lab.Readings(window), leastCoverage: 0);
    }

    private static SourceProfile Live(CavityLab lab)
    {
        LabSnapshot snapshot = lab.Snapshot();
        TimeWindow window = new(CavityLab.Noon, new Instant(CavityLab.Noon.Microseconds + 1));
        return SourceProfile.Of(
            snapshot,
            snapshot.Sources[0],
            [.. lab.Readings(window).Series.Select(series => new Reading(series.Channel, new Instant(series.TimeMicroseconds.Span[0]), series.Values.Span[0]))],
            CavityLab.Noon,
            DemoRun.Models);
    }

    private static BandModel Model()
    {
        ReferenceSource source = new CavityLab().Snapshot().Sources[0];
        return DemoRun.Models.ModelOf(source, source.Bands[0]);
    }

    /// <summary>Root sum of squares without what the draws leave out: shape of the front, zones, method.</summary>
    private static double Combined(BandRadiance radiance, Func<Radiated, double> of) => Math.Sqrt(radiance.Contributions
        .Where(part => part.Input is not (ContributionKind.LipShape or ContributionKind.Discretisation or ContributionKind.Method))
        .Sum(part => Math.Pow(of(part.Change), 2)));

    private static double Deviation(List<double> values)
    {
        double mean = values.Average();
        return Math.Sqrt(values.Sum(value => Math.Pow(value - mean, 2)) / (values.Count - 1));
    }

    /// <summary>By the method of G. E. P. Box and M. E. Muller (1958).</summary>
    private static double Normal(Random random) => Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
}
