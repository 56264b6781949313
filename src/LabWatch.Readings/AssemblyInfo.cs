using System.Runtime.CompilerServices;

[assembly: InternalsVisibleTo("LabWatch.Evidence")]
[assembly: InternalsVisibleTo("LabWatch.Tests")]
[assembly: InternalsVisibleTo("LabWatch.Benchmarks")]
[assembly: InternalsVisibleTo("LabWatch.SystemTests")]
