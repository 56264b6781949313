using LabWatch.Assessments;

namespace LabWatch.Tests.Assessments.Cavities;

/// <summary>
/// Check values of cavities through the criterion itself: geometry in millimetres, wells as channels with certificates, readings, to the figure that is recorded. Sources of the
/// values stand in the files' columns: integral equation with ring kernels (A) and backward Monte Carlo (B), both computed elsewhere.
/// </summary>
public sealed class CavityCheckValueTests
{
    [Theory]
    [InlineData("cavity_t3_cylinder_diffuse.csv", 4)]
    [InlineData("cavity_t4_cylinder_cone_diffuse.csv", 9)]
    public void Diffuse_cavities_agree_to_the_error_of_both(string file, int every)
    {
        CheckCavity[] rows = [.. CheckCavity.Read(file).Where(row => row.IsSeenFromOutside && row.Row["method"].StartsWith('A')).Where((_, i) => i % every == 0)];
        Assert.True(rows.Length > 10);
        foreach (CheckCavity row in rows)
        {
            // 1 - e_eff: our panels leave 1e-9 of it, the file states its own; rounding of an e_eff near one adds 2e-16.
            double complement = row.Value("one_minus_eps_eff"), tolerance = (3e-9 * complement) + (3 * row.Value("u_one_minus")) + 4e-16;
            CriterionResult result = row.Evaluate("8-14", 8, 14, (0, 773.15), (row.Value("Lc") / 2, 773.15));
            Assert.True(Math.Abs(1 - Figure(result, "effective-emissivity") - complement) <= tolerance, $"{row.Id}: {1 - Figure(result, "effective-emissivity"):R} against {complement:R}");
        }
    }

    [Fact]
    public void Cavities_with_a_mirror_part_agree_within_the_standard_errors()
    {
        CheckCavity[] rows = [.. CheckCavity.Read("cavity_t5_specular_diffuse.csv").Where(row => row.IsSeenFromOutside && row.Value("D") < 1).Where((_, i) => i % 7 == 0)];
        Assert.True(rows.Length > 10);
        foreach (CheckCavity row in rows)
        {
            CriterionResult result = row.Evaluate("8-14", 8, 14, (0, 773.15), (row.Value("Lc") / 2, 773.15));
            double difference = 1 - Figure(result, "effective-emissivity") - row.Value("one_minus_eps_eff");
            double error = double.Hypot(Figure(result, "u-method"), row.Value("u_one_minus"));
            Assert.True(Math.Abs(difference) <= 4 * error, $"{row.Id}: {difference:E2} with a standard error of {error:E2}");
        }
    }

    [Fact]
    public void Cavities_with_a_gradient_agree_within_the_stated_error_of_the_zones()
    {
        CheckCavity[] rows = [.. CheckCavity.Read("cavity_t6_nonisothermal.csv").Where(row => row.IsSeenFromOutside && row.Row["eps_eff_continuous"].Length > 0).Where((_, i) => i % 11 == 0)];
        Assert.True(rows.Length > 50);
        foreach (CheckCavity row in rows)
        {
            (double lower, double upper) = row.Row["lambda_um"] == "8-14" ? (8, 14) : (row.Value("lambda_um"), row.Value("lambda_um"));
            double length = row.Value("Lc"), bottom = row.Value("T0"), fall = row.Value("dT");

            // A straight fall needs two wells; one that goes with the square of the height is given by many, so that the interpolation adds below 1e-3 of the fall's curvature.
            int wells = row.Row["profile"] == "lin" ? 2 : 41;
            (double, double)[] profile = [.. Enumerable.Range(0, wells).Select(i => (double)i / (wells - 1)).Select(u => (u * length, bottom + (fall * (wells == 2 ? u : u * u))))];
            CriterionResult result = row.Evaluate("band", lower, upper, profile);
            double difference = Figure(result, "effective-emissivity") - row.Value("eps_eff_continuous");
            double tolerance = (2 * Figure(result, "u-zones")) + row.Value("u_eps_eff") + 2e-8;
            Assert.True(Math.Abs(difference) <= tolerance, $"{row.Id}: {difference:E2}, stated {Figure(result, "u-zones"):E2}");
            Assert.True(Figure(result, "u-zones") < 1e-3);
        }
    }

    private static double Figure(CriterionResult result, string name) => CriterionResult.Figure(result.Figures, name);
}
