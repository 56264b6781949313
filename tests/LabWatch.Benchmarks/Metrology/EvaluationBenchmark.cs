using System.Diagnostics;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Radiometry;
using LabWatch.Metrology.Thermometry;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Benchmarks.Metrology;

/// <summary>Time and allocation of the evaluations that run live, and of a Monte Carlo propagation; median of seven runs each.</summary>
internal static class EvaluationBenchmark
{
    private const int Runs = 7;
    private const int Calls = 1_000_000;

    public static int Run(string[] args)
    {
        double[] kelvin = [.. Enumerable.Range(0, 1024).Select(i => 250 + (1.1 * i))];
        RadianceBand band = RadianceBand.Of(8, 14);
        double[] radiance = [.. kelvin.Select(band.Radiance)];
        Report("band radiance, 8-14 um", i => band.Radiance(kelvin[i & 1023]));
        Report("band radiance inverse, 8-14 um", i => band.Temperature(radiance[i & 1023]));
        RadianceBand wavelength = RadianceBand.At(0.9);
        double[] spectral = [.. kelvin.Select(wavelength.Radiance)];
        Report("Planck inverse, 0.9 um", i => wavelength.Temperature(spectral[i & 1023]));

        double[] above = [.. Enumerable.Range(0, 1024).Select(i => Its90.Ratio(274 + (0.9 * i)))];
        double[] below = [.. Enumerable.Range(0, 1024).Select(i => Its90.Ratio(84 + (0.18 * i)))];
        Report("ITS-90 inverse above 0.01 degC", i => Its90.Kelvin(above[i & 1023]));
        Report("ITS-90 inverse below 0.01 degC", i => Its90.Kelvin(below[i & 1023]));

        Report("certificate, Pt100 above 0 degC", Evaluation(new CallendarVanDusenCharacteristic(0.02, 2, 100, 3.9083e-3, -5.775e-7, -4.183e-12), 101, 0.1));
        Report("certificate, Pt100 below 0 degC", Evaluation(new CallendarVanDusenCharacteristic(0.02, 2, 100, 3.9083e-3, -5.775e-7, -4.183e-12), 60, 0.03));
        SprtDeviation zinc = new(SprtSubrange.WaterToZinc, [-1.9736e-4, -2.114e-5]);
        Report("certificate, SPRT", Evaluation(new SprtCharacteristic(0.002, 2, 25.479112, null, zinc), 25.6, 0.03));
        Report("certificate, type S", Evaluation(new ThermocoupleCharacteristic(1, 2, ThermocoupleType.S, [1e-6, 1e-9], 0), 0.5, 0.01));
        MonteCarlo();
        return 0;
    }

    private static Func<int, double> Evaluation(Characteristic characteristic, double start, double step)
    {
        Certificate certificate = new("bench", 1, "bench", "bench", "bench", Instant.FromUnixSeconds(0), null, -200, 1700, characteristic);
        return i => CertificateEvaluation.Evaluate(certificate, start + (step * (i & 1023))).Celsius.Value;
    }

    private static void MonteCarlo()
    {
        UncertaintyBudget budget = new([.. Enumerable.Range(1, 10).Select(i => new BudgetInput($"term {i}", new Estimate(i, 0.1 * i), 1))]);
        MonteCarloOptions options = new() { Trials = 1_000_000 };
        TimeSpan before = Environment.CpuUsage.TotalTime;
        double milliseconds = Median(() => MonteCarloPropagation.Run(budget, options)) * 1000;
        double processor = (Environment.CpuUsage.TotalTime - before).TotalMilliseconds / (Runs + 1);
        Console.WriteLine(
            $"JCGM 101, 1e6 trials, ten terms      {milliseconds,8:F1} ms on {Environment.ProcessorCount} processors, {processor:F0} ms of processor time");
    }

    private static void Report(string name, Func<int, double> call)
    {
        double sum = 0;
        long before = GC.GetAllocatedBytesForCurrentThread();
        double seconds = Median(() =>
        {
            for (int i = 0; i < Calls; i++)
            {
                sum += call(i);
            }
        });
        long bytes = (GC.GetAllocatedBytesForCurrentThread() - before) / ((long)Calls * (Runs + 1));
        Console.WriteLine($"{name,-36} {seconds * 1e9 / Calls,8:F1} ns, {bytes} bytes a call{(double.IsNaN(sum) ? " (NaN!)" : string.Empty)}");
    }

    private static double Median(Action action)
    {
        action();
        double[] seconds = new double[Runs];
        for (int run = 0; run < Runs; run++)
        {
            long start = Stopwatch.GetTimestamp();
            action();
            seconds[run] = Stopwatch.GetElapsedTime(start).TotalSeconds;
        }

        Array.Sort(seconds);
        return seconds[Runs / 2];
    }
}
