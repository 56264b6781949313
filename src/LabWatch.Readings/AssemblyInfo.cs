using System.Runtime.CompilerServices;

[assembly: InternalsVisibleTo("LabWatch.Tests")]
[assembly: InternalsVisibleTo("LabWatch.Benchmarks")]
