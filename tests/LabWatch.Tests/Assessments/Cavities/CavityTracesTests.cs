using LabWatch.Assessments.Cavities;
using LabWatch.Metrology.Cavities;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Tests.Assessments.Cavities;

public sealed class CavityTracesTests : IDisposable
{
    private static readonly CavityTraceKey Diffuse = new(new(CavityForm.CylinderOutwardCone, 25, 100, 60, 20), CavityView.Cone(700, 8), 1, SecondMaterial.None);
    private static readonly CavityTraceKey Mirrored = Diffuse with { DiffuseFraction = 0.9 };

    private readonly string _folder = Path.Combine(Path.GetTempPath(), "labwatch-traces-" + Guid.NewGuid().ToString("N"));

    public void Dispose()
    {
        if (Directory.Exists(_folder))
        {
            Directory.Delete(_folder, recursive: true);
        }
    }

    [Fact]
    public void A_kept_trace_is_read_after_a_restart_and_gives_the_same_bits()
    {
        CavityTraces first = New(), second = New();
        foreach (CavityTraceKey key in new[] { Diffuse, Mirrored })
        {
            ZoneWeights traced = first.Of(key).Weights(0.93), read = second.Of(key).Weights(0.93);
            Assert.Equal(traced.Weights.ToArray(), read.Weights.ToArray());
            Assert.Equal((traced.IsothermalComplement, traced.StandardError), (read.IsothermalComplement, read.StandardError));
        }

        Assert.Equal((2, 0), (first.Computed, second.Computed));
    }

    [Fact]
    public void A_damaged_file_is_traced_again_and_replaced()
    {
        double good = New().Of(Diffuse).Weights(0.93).IsothermalComplement;
        string file = Assert.Single(Directory.GetFiles(_folder));
        byte[] bytes = File.ReadAllBytes(file);
        bytes[bytes.Length / 2] ^= 64;
        File.WriteAllBytes(file, bytes);

        CavityTraces after = New();
        Assert.Equal(good, after.Of(Diffuse).Weights(0.93).IsothermalComplement);
        Assert.Equal(1, after.Computed);
        CavityTraces later = New();
        later.Of(Diffuse);
        Assert.Equal(0, later.Computed);
    }

    [Fact]
    public void A_file_of_another_trace_under_this_name_is_traced_again()
    {
        New().Of(Mirrored);
        string other = Assert.Single(Directory.GetFiles(_folder));
        File.Move(other, Path.Combine(_folder, Diffuse.Digest(CavityTraces.Options) + ".hits"));

        CavityTraces traces = New();
        Assert.Equal(CavityMethod.IntegralEquation, traces.Of(Diffuse).Method);
        Assert.Equal(1, traces.Computed);
    }

    [Fact]
    public void A_folder_that_cannot_be_written_costs_only_the_keeping()
    {
        File.WriteAllText(_folder, "a file where the folder should be");
        try
        {
            Assert.True(New().Of(Diffuse).Weights(0.93).IsothermalComplement > 0);
        }
        finally
        {
            File.Delete(_folder);
        }
    }

    [Fact]
    public void Everything_that_the_counts_depend_on_is_in_the_digest()
    {
        MonteCarloOptions options = CavityTraces.Options;
        string[] digests =
        [
            Diffuse.Digest(options),
            Mirrored.Digest(options),
            (Diffuse with { Second = SecondMaterial.Plate }).Digest(options),
            (Diffuse with { View = CavityView.Cone(701, 8) }).Digest(options),
            (Diffuse with { View = CavityView.Beam(8) }).Digest(options),
            (Diffuse with { Geometry = Diffuse.Geometry with { Length = 100.0000001 } }).Digest(options),
            (Diffuse with { Geometry = Diffuse.Geometry with { Form = CavityForm.Cylinder } }).Digest(options),
            Diffuse.Digest(options with { Seed = 2 }),
            Diffuse.Digest(options with { RaysPerReplicate = 2 }),
            Diffuse.Digest(options with { Depth = 25 }),
        ];
        Assert.Equal(digests.Length, digests.Distinct().Count());
        Assert.Equal(Diffuse.Digest(options), Diffuse.Digest(options with { Threads = 7 }));
    }

    [Fact]
    public void Many_who_ask_at_once_share_one_trace()
    {
        CavityTraces traces = New();
        HitCounts[] counts = new HitCounts[16];
        Parallel.For(0, counts.Length, i => counts[i] = traces.Of(Mirrored));
        Assert.All(counts, one => Assert.Same(counts[0], one));
        Assert.Equal(1, traces.Computed);
    }

    private CavityTraces New() => new(_folder, NullLogger<CavityTraces>.Instance);
}
