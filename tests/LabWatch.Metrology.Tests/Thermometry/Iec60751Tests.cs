using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Thermometry;

public sealed class Iec60751Tests : CheckSuiteTests<Iec60751Suite>;
