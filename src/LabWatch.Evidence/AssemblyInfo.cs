using System.Runtime.CompilerServices;

[assembly: InternalsVisibleTo("LabWatch.Tests")]
[assembly: InternalsVisibleTo("LabWatch.SystemTests")]
[assembly: InternalsVisibleTo("LabWatch.Benchmarks")]
