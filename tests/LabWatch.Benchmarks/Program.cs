using LabWatch.Benchmarks.Alerts;
using LabWatch.Benchmarks.Assessments;
using LabWatch.Benchmarks.Intake;
using LabWatch.Benchmarks.Metrology;
using LabWatch.Benchmarks.Readings;
using LabWatch.Benchmarks.Records;
using LabWatch.Benchmarks.Simulator;

string[] rest = [.. args.Skip(1)];
switch (args.FirstOrDefault())
{
    case "cavity":
        return CavityBenchmark.Run(rest);
    case "criteria":
        return await CriteriaBenchmark.RunAsync(rest);
    case "engine":
        return await EngineBenchmark.RunAsync(rest);
    case "evaluation":
        return EvaluationBenchmark.Run(rest);
    case "hazard":
        return await HazardBenchmark.RunAsync(rest);
    case "intake":
        return IntakeBenchmark.Run(rest);
    case "intake-publisher":
        return IntakePublisher.Run(rest);
    case "profile":
        return ProfileBenchmark.Run(rest);
    case "simulator":
        return SimulatorBenchmark.Run(rest);
    case "statistics":
        return StatisticsBenchmark.Run(rest);
    case "store":
        return await StoreBenchmark.RunAsync(rest);
    case "store-memory":
        return await YearBenchmark.MemoryAsync(rest);
    case "store-open":
        return await YearBenchmark.OpenAsync(rest);
    case "store-year":
        return await YearBenchmark.RunAsync(rest);
    case "trail":
        return await TrailBenchmark.RunAsync(rest);
    default:
        Console.Error.WriteLine("Give the name of a benchmark: cavity, criteria, engine, evaluation, hazard, intake, profile, simulator, statistics, store, store-memory, store-year, trail.");
        return 1;
}
