using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Runs;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Records.Accounts;
using LabWatch.Service.Api.Access;
using LabWatch.Service.Api.Runs;
using LabWatch.Service.Api.Views;
using LabWatch.Tests.Api.Fakes;

namespace LabWatch.Tests.Api;

public sealed class RunRulesTests
{
    private static readonly Instant Now = Instant.FromUnixSeconds(1_796_000_000);
    private static readonly LabSnapshot Lab = new SampleLab().Current;
    private static readonly ReferenceSource Fir = Lab.FindSource(SampleLab.Fir)!;

    [Fact]
    public void A_ready_source_starts_without_a_reason() => Assert.Empty(Refusal(Lab, "ready", [], null, Role.Technician).Findings);

    [Theory]
    [InlineData(Role.Technician)]
    [InlineData(Role.QualityManager)]
    public void A_hazard_that_blocks_is_overridden_by_nobody(Role role)
    {
        (IReadOnlyList<Finding> findings, bool isForbidden) = Refusal(Lab, "not-fit", [new("over-temperature", "Too hot.", true, false)], "Urgent", role);
        Assert.Equal(("hazard-blocks", false), (Assert.Single(findings).Code, isForbidden));
    }

    [Fact]
    public void A_hazard_to_people_alone_is_told_and_does_not_stand_against_the_run() =>
        Assert.Empty(Refusal(Lab, "ready", [new("hot-surface", "The case reads 60 degC.", false, false)], null, Role.Technician).Findings);

    [Fact]
    public void Not_ready_is_overridden_with_a_reason()
    {
        ReadinessReasonView[] settling = [new("settling", "Its stability has not been assessed yet.", true, true)];
        Assert.Equal(["not-ready"], Refusal(Lab, "settling", settling, null, Role.Technician).Findings.Select(finding => finding.Code));
        Assert.Empty(Refusal(Lab, "settling", settling, "Check only", Role.Technician).Findings);
    }

    [Fact]
    public void Readiness_at_another_set_point_is_not_that_of_the_run() =>
        Assert.Equal(["other-set-point"], Refusal(Lab, "ready", [], null, Role.Technician, setPoint: 60).Findings.Select(finding => finding.Code));

    [Theory]
    [InlineData("missing", "certificate-missing")]
    [InlineData("overdue", "certificate-overdue")]
    [InlineData("range", "certificate-range")]
    public void An_invalid_certificate_is_never_overridden_by_a_technician(string what, string code)
    {
        LabSnapshot lab = With(what switch
        {
            "missing" => [],
            "overdue" => [.. Lab.Certificates.Select(certificate => certificate with { DueAt = Now })],
            _ => [.. Lab.Certificates.Select(certificate => certificate with { MaximumCelsius = 29 })],
        });
        (IReadOnlyList<Finding> findings, bool isForbidden) = Refusal(lab, "not-fit", [], "Urgent", Role.Technician);
        Assert.Equal((code, true), (Assert.Single(findings).Code, isForbidden));
        Assert.Contains(Refusal(lab, "not-fit", [], null, Role.QualityManager).Findings, finding => finding.Code == code);
        Assert.Empty(Refusal(lab, "not-fit", [], "Compared with the sister source", Role.QualityManager).Findings);
    }

    [Fact]
    public void An_overdue_certificate_of_another_well_is_not_overridden_by_a_technician_either()
    {
        ReadinessReasonView[] overdue = [new("certificate", "Certificate N of well-b has been overdue for 3 days.", true, false)];
        (IReadOnlyList<Finding> findings, bool isForbidden) = Refusal(Lab, "not-fit", overdue, "Urgent", Role.Technician);
        Assert.Equal(("certificate-invalid", true), (Assert.Single(findings).Code, isForbidden));
        Assert.Empty(Refusal(Lab, "not-fit", overdue, "That well is not used", Role.QualityManager).Findings);
    }

    private static (IReadOnlyList<Finding> Findings, bool IsForbidden) Refusal(
        LabSnapshot lab, string state, IReadOnlyList<ReadinessReasonView> reasons, string? overrideReason, Role role, double setPoint = 30) =>
        RunRules.Refusal(
            lab,
            Fir,
            new SourceStatusView(Fir.Key.ToString(), new ReadinessView(state, reasons, null), null, 30, Now, false, [], [], null),
            new CalibrationRun(Guid.CreateVersion7(), Fir.Key, "J", "T", setPoint, Now, "kim", "unknown") { OverrideReason = overrideReason },
            new Caller("kim", "Kim", [role]));

    private static LabSnapshot With(IReadOnlyList<Certificate> certificates) =>
        new(Lab.Site, Lab.Sources, Lab.Instruments, Lab.Installations, certificates, Lab.Limits, Lab.Notifiers);
}
