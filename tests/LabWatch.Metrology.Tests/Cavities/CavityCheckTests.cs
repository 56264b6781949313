using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Cavities;

public sealed class SphereChecks : CheckSuiteTests<SphereSuite>;

public sealed class DiffuseCavityChecks : CheckSuiteTests<DiffuseCavitySuite>;

public sealed class MirrorCavityChecks : CheckSuiteTests<MirrorCavitySuite>;

public sealed class ZoneWeightChecks : CheckSuiteTests<ZoneWeightSuite>;

public sealed class NonIsothermalChecks : CheckSuiteTests<NonIsothermalSuite>;
