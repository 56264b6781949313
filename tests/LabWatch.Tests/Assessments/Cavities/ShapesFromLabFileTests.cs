using System.Globalization;
using System.Text;
using System.Text.Json.Nodes;
using LabWatch.Assessments.Cavities;
using LabWatch.Lab.Findings;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Cavities;
using LabWatch.Service.Calc;
using LabWatch.Simulator;

namespace LabWatch.Tests.Assessments.Cavities;

/// <summary>Every shape from the lab file to the effective emissivity that the service uses, against <c>labwatch calc cavity</c> with the same rays.</summary>
public sealed class ShapesFromLabFileTests
{
    private const int Rays = 4096;
    private static readonly Instant Start = Instant.FromUnixSeconds(1_793_577_600);

    [Theory]
    [InlineData("cylinder", 20, 160, null, 20, 0.9, 0.85, null, "monte-carlo")]
    [InlineData("cylinder", 20, 160, null, 12, 0.9, 0.85, null, "monte-carlo")]
    [InlineData("cylinder", 20, 160, null, 12, 0.9, 0.85, 0.6, "monte-carlo")]
    [InlineData("cylinder-inward-cone", 20, 160, 60.0, 14, 0.9, 0.85, null, "monte-carlo")]
    [InlineData("cylinder-outward-cone", 20, 160, 60.0, 14, 0.9, 0.85, null, "monte-carlo")]
    [InlineData("cone", 20, 80, null, 20, 0.9, 0.85, null, "monte-carlo")]
    [InlineData("sphere", 30, 0, null, 8, 0.9, 0.85, null, "monte-carlo")]
    [InlineData("flat-plate", 40, 0, null, 40, 0.95, 0.85, null, "flat-plate")]
    [InlineData("cylinder-outward-cone", 20, 160, 60.0, 14, 0.9, 1.0, null, "ring-kernels")]
    [InlineData("sphere", 30, 0, null, 8, 0.9, 1.0, null, "closed-form")]
    public void What_the_service_uses_is_what_the_calculator_gives(
        string shape, double radius, double length, double? angle, double aperture, double emissivity, double diffuse, double? plate, string method)
    {
        ReferenceSource source = FromLabFile(shape, radius, length, angle, aperture, emissivity, diffuse, plate);

        BandModel model = DemoRun.Models.ModelOf(source, source.Bands[0]);

        Assert.Empty(model.Problems);
        Assert.Equal(method, model.Method);
        JsonObject answer = Calculate(shape, radius, length, angle, aperture, emissivity, diffuse, plate);
        Assert.Equal(method switch { "ring-kernels" => "integral-equation", "flat-plate" => "closed-form", _ => method }, answer["method"]!.GetValue<string>());

        // The same rays and seed; the calculator follows more reflections, of which walls of 0.6 and blacker keep below 3e-10.
        Assert.Equal(answer["effective_emissivity"]!.GetValue<double>(), model.Weights!.Isothermal, 1e-9);
        Assert.Equal(answer["u_numerical"]!.GetValue<double>(), model.MethodError, 1e-9);
        Assert.Equal(method == "monte-carlo", model.MethodError > 0 && model.Weights.Counts.Method == CavityMethod.MonteCarlo);
    }

    private static ReferenceSource FromLabFile(
        string shape, double radius, double length, double? angle, double aperture, double emissivity, double diffuse, double? plate)
    {
        JsonObject cavity = new() { ["shape"] = shape, ["radiusMillimetre"] = radius, ["apertureRadiusMillimetre"] = aperture };
        if (length > 0)
        {
            cavity["lengthMillimetre"] = length;
        }

        if (angle is not null)
        {
            cavity["coneHalfAngleDegree"] = angle;
        }

        JsonObject coating = new() { ["band"] = "8-14", ["emissivity"] = Estimate(emissivity), ["diffuseFraction"] = Estimate(diffuse) };
        if (plate is { } second)
        {
            cavity["secondMaterial"] = "aperture-plate";
            coating["secondEmissivity"] = Estimate(second);
        }

        cavity["coating"] = new JsonArray(coating);
        JsonObject file = JsonNode.Parse(DemoLab.LabFileFor(Start), documentOptions: new() { CommentHandling = System.Text.Json.JsonCommentHandling.Skip, AllowTrailingCommas = true })!.AsObject();
        JsonObject fir = file["sources"]!.AsArray().Select(node => node!.AsObject()).Single(node => node["id"]!.GetValue<string>() == "fir");
        fir["cavity"] = cavity;
        fir["view"] = new JsonObject { ["kind"] = "cone", ["spotRadiusMillimetre"] = 4, ["distanceMillimetre"] = 700 };
        fir["channels"]!.AsArray().Select(node => node!.AsObject()).Where(node => node.ContainsKey("axialPositionMillimetre")).ToList().ForEach(node => node["axialPositionMillimetre"] = 0.5 + node["axialPositionMillimetre"]!.GetValue<double>() / 1000);
        LabFileResult result = LabFileReader.Read(Encoding.UTF8.GetBytes(file.ToJsonString()));
        Assert.True(result.Snapshot is not null, string.Join('\n', result.Findings.Select((Finding finding) => finding.ToString())));
        return result.Snapshot.Sources.Single(source => source.Key.Source == "fir");
    }

    private static JsonObject Calculate(
        string shape, double radius, double length, double? angle, double aperture, double emissivity, double diffuse, double? plate)
    {
        JsonObject input = new()
        {
            ["form"] = shape,
            ["radius_mm"] = radius,
            ["aperture_radius_mm"] = aperture,
            ["view"] = "cone",
            ["view_radius_mm"] = 4,
            ["view_distance_mm"] = 700,
            ["emissivity"] = emissivity,
            ["diffuse_fraction"] = diffuse,
            ["rays"] = Rays,
            ["seed"] = (long)CavityTraces.Options.Seed,
        };
        if (length > 0)
        {
            input["length_mm"] = length;
        }

        if (angle is not null)
        {
            input["cone_half_angle_deg"] = angle;
        }

        if (plate is not null)
        {
            input["plate_emissivity"] = plate;
        }

        CalcResult? result = Calculators.Find("cavity")!.Run(input.ToJsonString(), out var findings);
        Assert.True(result is not null, string.Format(CultureInfo.InvariantCulture, "{0}", string.Join('\n', findings)));
        return (JsonObject)JsonNode.Parse(result.Values.ToJsonString())!;
    }

    private static JsonObject Estimate(double value) => new() { ["value"] = value, ["standardUncertainty"] = 0 };
}
