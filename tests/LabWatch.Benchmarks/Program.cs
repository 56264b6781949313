using LabWatch.Benchmarks.Alerts;
using LabWatch.Benchmarks.Readings;
using LabWatch.Benchmarks.Simulator;

string[] rest = [.. args.Skip(1)];
switch (args.FirstOrDefault())
{
    case "hazard":
        return await HazardBenchmark.RunAsync(rest);
    case "simulator":
        return SimulatorBenchmark.Run(rest);
    case "store":
        return await StoreBenchmark.RunAsync(rest);
    default:
        Console.Error.WriteLine("Give the name of a benchmark: hazard, simulator, store.");
        return 1;
}
