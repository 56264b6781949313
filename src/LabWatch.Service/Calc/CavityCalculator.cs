using LabWatch.Metrology.Cavities;
using LabWatch.Metrology.Radiometry;

namespace LabWatch.Service.Calc;

/// <summary>Effective emissivity of a cavity.</summary>
internal sealed class CavityCalculator : Calculator
{
    private const int MostRays = 1 << 20;

    public override string Name => "cavity";

    public override string Summary => "Effective emissivity of a cavity for a view, with zone weights, a temperature profile and the derivatives.";

    public override IReadOnlyList<string> Formula { get; } =
    [
        "w_i(e) = e sum_k (1 - e)^k H[i,k], H the mean hits in zone i after k reflections; 1 - e_eff = sum_k (1 - e)^(k+1) E[k], E the escapes",
        "with a profile: 1 - e_eff = that + sum_i w_i (1 - L(T_i)/L(T_ref)); the surroundings are reflected by 1 - sum_i w_i",
        "diffuse walls: integral equation with ring kernels, to about 1e-9 of 1 - e_eff; with a mirror part: backward Monte Carlo, scrambled Sobol points",
    ];

    public override IReadOnlyList<string> Source { get; } =
    [
        "E. M. Sparrow and co-workers 1960-62; R. E. Bedford and C. K. Ma, J. Opt. Soc. Am. 64 (1974) 339-349",
        "T. J. Quinn, Temperature, 2nd ed. 1990, chapter 7",
        "F. N. Fritsch and J. Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300-304 (profile between wells)",
    ];

    public override IReadOnlyList<CalcField> Fields { get; } =
    [
        CalcField.Choice(
            "form", "form of the cavity", "cylinder", "cylinder-inward-cone", "cylinder-outward-cone", "cone", "sphere", "flat-plate"),
        CalcField.Positive("radius_mm", "inner radius of the cylinder, of the cone's base or of the sphere, mm"),
        CalcField.Positive("length_mm", "length from the aperture plane to the rim of the bottom, height of a cone, mm; not for sphere and plate").Optional(),
        CalcField.Number("cone_half_angle_deg", "half-angle of a conical bottom, degrees").Optional() with { Minimum = 5, Maximum = 89 },
        CalcField.Positive("aperture_radius_mm", "radius of the opening, mm; the inner radius where missing").Optional(),
        CalcField.Choice("view", "kind of view", "axis", "beam", "cone", "hemispherical", "wall"),
        CalcField.Positive("view_radius_mm", "radius of the beam, or of the spot in the aperture plane, mm").Optional(),
        CalcField.Positive("view_distance_mm", "distance of the detector from the aperture plane for the view cone, mm").Optional(),
        CalcField.NotNegative("view_depth_mm", "depth below the aperture plane of the wall element for the view wall, mm").Optional(),
        CalcField.Positive("emissivity", "wall emissivity") with { Maximum = 1 },
        CalcField.NotNegative("u_emissivity", "its standard uncertainty; 0 where missing").Optional() with { Maximum = 1 },
        CalcField.NotNegative("diffuse_fraction", "diffuse fraction of the reflection; 1 where missing").Optional() with { Maximum = 1 },
        CalcField.NotNegative("u_diffuse_fraction", "its standard uncertainty; 0 where missing; not with plate_emissivity").Optional() with { Maximum = 1 },
        CalcField.Positive("plate_emissivity", "emissivity of the aperture plate where it differs").Optional() with { Maximum = 1 },
        CalcField.Numbers("depth_mm", "depths of the wells below the aperture plane, mm").Optional() with { MaximumItems = 100 },
        CalcField.Numbers("t_c", "temperature at each well, degree Celsius").Optional() with { Minimum = -273.15, Maximum = 1e4, MaximumItems = 100 },
        CalcField.Celsius("t_ref_c", "reference temperature, degree Celsius; the deepest well where missing").Optional(),
        CalcField.Celsius("t_background_c", "radiance temperature of the surroundings, degree Celsius; 23 where missing").Optional(),
        CalcField.Positive("lambda_min_um", "wavelength, or lower edge of the band, um").Optional() with { Minimum = 0.1, Maximum = 1000 },
        CalcField.Positive("lambda_max_um", "upper edge of the band, um; one wavelength where missing").Optional() with { Minimum = 0.1, Maximum = 1000 },
        CalcField.Integer("rays", "rays of a Monte Carlo trace; 65536 where missing", 16, MostRays).Optional(),
        CalcField.Integer("seed", "seed of a Monte Carlo trace; 1 where missing", 0, int.MaxValue).Optional(),
        CalcField.Flag("zones", "whether to list the zones with their weights"),
    ];

    public override IReadOnlyList<(string Name, string Description)> Outputs { get; } =
    [
        ("method", "closed-form, integral-equation or monte-carlo"),
        ("effective_emissivity", "isothermal effective emissivity"),
        ("one_minus_effective_emissivity", "one minus that, to full relative precision"),
        ("u_numerical", "Monte Carlo standard error, or the estimated error of the other methods"),
        ("slope_of_emissivity", "derivative of the effective emissivity with respect to the wall emissivity"),
        ("slope_of_diffuse_fraction", "derivative of the effective emissivity with respect to the diffuse fraction; only with u_diffuse_fraction"),
        ("u_effective_emissivity", "standard uncertainty from wall emissivity, diffuse fraction and numerical error"),
        ("profile_effective_emissivity", "with the temperature profile in the band, for the reference temperature"),
        ("reflected_part", "part of the surroundings' radiance that is reflected"),
        ("radiance_temperature_c", "radiance temperature in the band with the surroundings, degree Celsius"),
        ("zone_depth_mm", "depth of each zone below the aperture plane, mm"),
        ("zone_radius_mm", "distance of each zone from the axis, mm"),
        ("zone_weight", "weight of each zone"),
    ];

    public override string Example =>
        """
        { "form": "cylinder-outward-cone", "radius_mm": 25, "length_mm": 200, "cone_half_angle_deg": 60, "aperture_radius_mm": 12.5,
          "view": "cone", "view_radius_mm": 5, "view_distance_mm": 700, "emissivity": 0.9, "u_emissivity": 0.02,
          "depth_mm": [10, 60, 120, 195], "t_c": [498.2, 499.4, 499.9, 500.0], "t_ref_c": 500, "lambda_min_um": 8, "lambda_max_um": 14 }
        """;

    public override void Evaluate(CalcInput input, CalcResult result)
    {
        if (Geometry(input) is not { } geometry || View(input, geometry) is not { } view) return;
        double diffuse = input.Number("diffuse_fraction", 1);
        if (view.Kind == CavityViewKind.Axis && diffuse < 1 && geometry.ConeDepth > 0)
        {
            input.Reject("no-limit", "view", "A single ray along the axis of a cone has no limit with a mirror part.", "Use a beam of a small radius.");
            return;
        }

        var options = new MonteCarloOptions((int)Math.Max(1, input.Integer("rays", 65_536) / 16), Seed: (ulong)input.Integer("seed", 1));
        bool plate = input.Has("plate_emissivity") && geometry.HasPlate;
        HitCounts counts = CavityTrace.Run(
            geometry, view, diffuse, null, plate ? SecondMaterial.Plate : SecondMaterial.None, plate ? options with { Depth = 24 } : options);
        ZoneWeights weights = counts.Weights(input.Number("emissivity"), plate ? input.Number("plate_emissivity") : input.Number("emissivity"));
        double byDiffuse = input.Number("u_diffuse_fraction", 0) > 0 && !plate ? DiffuseSlope(input, geometry, view, diffuse, options, result) : 0;
        Isothermal(input, weights, byDiffuse * input.Number("u_diffuse_fraction", 0), result);
        if (input.Has("depth_mm") || input.Has("t_c")) Profile(input, geometry, weights, result);
        if (!input.Flag("zones")) return;
        result.Add("zone_depth_mm", counts.Grid.Zones.Select(zone => Depth(geometry, zone)))
            .Add("zone_radius_mm", counts.Grid.Zones.Select(zone => zone.R * geometry.Radius))
            .Add("zone_weight", weights.Weights.ToArray());
    }

    /// <summary>Slope of the effective emissivity with respect to the diffuse fraction, from four traces with the same rays around it.</summary>
    private static double DiffuseSlope(
        CalcInput input, CavityGeometry geometry, CavityView view, double diffuse, MonteCarloOptions options, CalcResult result)
    {
        if (geometry.Form == CavityForm.FlatPlate || (view.Kind == CavityViewKind.Axis && geometry.ConeDepth > 0)) return 0;
        double low = Math.Clamp(diffuse - 0.2, 0, 0.4);
        double[] fractions = [low, low + 0.2, low + 0.4, low + 0.6];
        (_, double slope, _, _) = DiffuseFractionGrid.Trace(geometry, view, options, fractions).At(input.Number("emissivity"), Math.Clamp(diffuse, low, low + 0.6));
        result.Add("slope_of_diffuse_fraction", -slope);
        return slope;
    }

    private static void Isothermal(CalcInput input, ZoneWeights weights, double fromDiffuse, CalcResult result)
    {
        (_, double slope) = weights.Slopes();
        double numerical = Math.Max(weights.StandardError, weights.Counts.RelativeError * weights.IsothermalComplement);
        result.Add("method", weights.Counts.Method switch
        {
            CavityMethod.ClosedForm => "closed-form",
            CavityMethod.IntegralEquation => "integral-equation",
            _ => "monte-carlo",
        })
            .Add("effective_emissivity", weights.Isothermal)
            .Add("one_minus_effective_emissivity", weights.IsothermalComplement)
            .Add("u_numerical", numerical)
            .Add("slope_of_emissivity", -slope)
            .Add("u_effective_emissivity", double.Hypot(double.Hypot(slope * input.Number("u_emissivity", 0), numerical), fromDiffuse))
            .Step("u_from_diffuse_fraction", fromDiffuse)
            .Step("reflections_followed", weights.Counts.Depth)
            .Step("zones", weights.Counts.Grid.Zones.Count);
    }

    private static void Profile(CalcInput input, CavityGeometry geometry, ZoneWeights weights, CalcResult result)
    {
        double[] depths = input.Numbers("depth_mm"), celsius = input.Numbers("t_c");
        if (depths.Length != celsius.Length || !input.Has("lambda_min_um"))
        {
            input.Reject("profile", "t_c", "A profile needs one temperature for each depth, and a band.", "Give depth_mm, t_c and lambda_min_um.");
            return;
        }

        double lower = input.Number("lambda_min_um"), upper = input.Number("lambda_max_um", lower);
        if (upper < lower)
        {
            input.Reject("out-of-range", "lambda_max_um", "The upper edge lies below the lower one.", "Exchange the two.");
            return;
        }

        (double Position, double Kelvin)[] wells =
            [.. depths.Zip(celsius, (depth, t) => (Top(geometry) - depth, t + 273.15)).OrderBy(well => well.Item1)];
        if (wells.Select(well => well.Position).Distinct().Count() != wells.Length)
        {
            input.Reject("doubled", "depth_mm", "Two wells have the same depth.", "Give each depth once.");
            return;
        }

        double reference = input.Has("t_ref_c") ? input.Number("t_ref_c") + 273.15 : wells[0].Kelvin;
        double background = input.Number("t_background_c", 23) + 273.15;
        double[] kelvin = new double[weights.Counts.Grid.Zones.Count];
        new AxialProfile([.. wells.Select(well => well.Position)]).Fill([.. wells.Select(well => well.Kelvin)], weights.Counts.Grid.Zones, geometry.Radius, kelvin);
        if (!(reference > 0 && background > 0 && kelvin.All(t => t > 0)))
        {
            input.Reject("out-of-range", "t_c", "A temperature is absolute zero.", "Correct it.");
            return;
        }

        var band = RadianceBand.Of(lower, upper);
        var radiance = CavityRadiance.Of(weights, band, kelvin, reference);
        result.Add("profile_effective_emissivity", radiance.EffectiveEmissivity)
            .Add("reflected_part", radiance.ReflectedPart)
            .Add("radiance_temperature_c", radiance.RadianceKelvin(band, reference, background) - 273.15)
            .Step("zone_t_c", kelvin.Select(t => t - 273.15));
    }

    private static CavityGeometry? Geometry(CalcInput input)
    {
        CavityForm form = input.Text("form") switch
        {
            "cylinder" => CavityForm.Cylinder,
            "cylinder-inward-cone" => CavityForm.CylinderInwardCone,
            "cylinder-outward-cone" => CavityForm.CylinderOutwardCone,
            "cone" => CavityForm.Cone,
            "sphere" => CavityForm.Sphere,
            _ => CavityForm.FlatPlate,
        };
        double radius = input.Number("radius_mm");
        var geometry = new CavityGeometry(
            form, radius, input.Number("length_mm", 0), input.Number("cone_half_angle_deg", 0), input.Number("aperture_radius_mm", radius));
        foreach (string problem in geometry.Problems()) input.Reject("geometry", string.Empty, problem, "Correct the lengths or the form.");
        bool usable = geometry.Problems().Count == 0;
        if (usable && form is not (CavityForm.Sphere or CavityForm.FlatPlate) && geometry.Length > 200 * radius)
        {
            input.Reject("geometry", "length_mm", "The cavity is more than 200 times as long as its radius.", "Correct the lengths.");
            usable = false;
        }

        return usable ? geometry : null;
    }

    private static CavityView? View(CalcInput input, CavityGeometry geometry)
    {
        double radius = input.Number("view_radius_mm", 0);
        CavityView view = input.Text("view") switch
        {
            "axis" => CavityView.Axis,
            "beam" => CavityView.Beam(radius),
            "cone" => CavityView.Cone(input.Number("view_distance_mm", 0), radius),
            "wall" => CavityView.Wall(Top(geometry) - input.Number("view_depth_mm", 0)),
            _ => CavityView.Hemispherical,
        };
        IReadOnlyList<string> problems = view.Problems(geometry);
        foreach (string problem in problems) input.Reject("view", "view", problem, "Correct the view, or its radius, distance or depth.");
        return problems.Count == 0 ? view : null;
    }

    /// <summary>Height of the aperture plane above the point that positions are counted from.</summary>
    private static double Top(CavityGeometry geometry) => geometry.Form switch
    {
        CavityForm.Sphere => geometry.Radius + Math.Sqrt(geometry.Radius * geometry.Radius - geometry.ApertureRadius * geometry.ApertureRadius),
        CavityForm.FlatPlate => 0,
        _ => geometry.Length,
    };

    private static double Depth(CavityGeometry geometry, Zone zone) => Top(geometry) - zone.Z * geometry.Radius;
}
