using System.Diagnostics;
using System.Globalization;
using LabWatch.Assessments;
using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Criteria;
using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using Microsoft.Extensions.Logging.Abstractions;

namespace LabWatch.Benchmarks.Assessments;

/// <summary>
/// The cavity models and the live profile: traces of the demo's sources from nothing and from disk, a profile to effective emissivity in every band, and a whole window of
/// readings through both criteria. No arguments.
/// </summary>
internal static class ProfileBenchmark
{
    public static int Run(string[] args)
    {
        BenchSite site = BenchSite.Of(4, BenchSite.Morning);
        CavityModels models = Traced(site);
        TimeWindow window = new(BenchSite.Morning + TimeSpan.FromMinutes(30), BenchSite.Morning + TimeSpan.FromMinutes(60));
        TimeWindow span = new(BenchSite.Morning, window.End);
        IReadOnlyDictionary<string, ReadingWindow> readings = BenchSite.Windows(BenchSite.Packs(span.Start, span.Duration), span);
        Console.WriteLine("processor time of one thread, the best of some runs");
        foreach (ReferenceSource source in site.Snapshot.Sources)
        {
            ReadingWindow seen = readings[source.Key.Source];
            AxialEvidence evidence = AxialReader.Read(site.Snapshot, source, window, seen, leastCoverage: 0);
            BandModel[] bands = [.. source.Bands.Select(band => models.ModelOf(source, band))];
            double profile = Microseconds(2000, () =>
            {
                foreach (BandModel band in bands)
                {
                    BandRadianceEvaluation.Of(band, evidence);
                }
            });
            ICriterion[] criteria = [new AxialUniformityCriterion(AxialUniformityCriterion.DefaultSchedule, models), new EffectiveEmissivityCriterion(EffectiveEmissivityCriterion.DefaultSchedule, models)];
            double[] whole = [.. criteria.Select(criterion => Microseconds(200, () => criterion.Evaluate(new CriterionInput(site.Snapshot, source, window, seen))))];
            Console.WriteLine(string.Create(
                CultureInfo.InvariantCulture,
                $"  {source.Key.Source}: {evidence.Wells.Count} wells to e_eff, T_rad and their uncertainties in {bands.Length} band(s) {profile:F0} us; window of {seen.Series.Sum(series => series.Count)} readings: axial-uniformity {whole[0]:F0} us, effective-emissivity {whole[1]:F0} us"));
        }

        return 0;
    }

    private static CavityModels Traced(BenchSite site)
    {
        string folder = Directory.CreateTempSubdirectory("labwatch-traces-").FullName;
        try
        {
            Console.WriteLine(string.Create(
                CultureInfo.InvariantCulture, $"traces of a source (three diffuse fractions), {CavityTraces.Options.Threads} thread(s): {CavityTraces.Options.Replicates} x {CavityTraces.Options.RaysPerReplicate} rays, then read from disk"));
            CavityModels cold = New(folder), warm = New(folder);
            foreach (ReferenceSource source in site.Snapshot.Sources)
            {
                double traced = Once(cold, source), read = Once(warm, source);
                BandModel model = cold.ModelOf(source, source.Bands[0]);
                Console.WriteLine(string.Create(
                    CultureInfo.InvariantCulture, $"  {source.Key.Source}: {traced:F0} ms, then {read:F1} ms; 1 - e_eff = {model.Weights!.IsothermalComplement:E2}, standard error {model.MethodError:E1}"));
            }

            return cold;
        }
        finally
        {
            Directory.Delete(folder, recursive: true);
        }
    }

    private static CavityModels New(string folder) => new(new CavityTraces(folder, NullLogger<CavityTraces>.Instance));

    private static double Once(CavityModels models, ReferenceSource source)
    {
        long start = Stopwatch.GetTimestamp();
        foreach (WorkingBand band in source.Bands)
        {
            models.ModelOf(source, band);
        }

        return Stopwatch.GetElapsedTime(start).TotalMilliseconds;
    }

    private static double Microseconds(int times, Action run)
    {
        double best = double.PositiveInfinity;
        for (int round = 0; round < 7; round++)
        {
            TimeSpan used = Environment.CpuUsage.TotalTime;
            for (int i = 0; i < times; i++)
            {
                run();
            }

            best = Math.Min(best, (Environment.CpuUsage.TotalTime - used).TotalMicroseconds / times);
        }

        return best;
    }
}
