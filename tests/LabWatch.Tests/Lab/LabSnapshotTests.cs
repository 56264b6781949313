using System.Text;
using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Tests.Lab;

public sealed class LabSnapshotTests
{
    private static readonly LabSnapshot Sample = LabFileReader.Read(Encoding.UTF8.GetBytes(LabFileSample.Text)).Snapshot!;
    private static readonly SourceKey Fir = new("sample", "fir");

    [Theory]
    [InlineData("2025-12-31T23:59:59Z", null)]
    [InlineData("2026-01-15T00:00:00Z", null)]
    [InlineData("2026-02-01T00:00:00Z", "c-2")]
    public void CertificateInForce_follows_the_instrument_that_was_installed_then(string at, string? certificate) =>
        Assert.Equal(certificate, Sample.CertificateInForce(new ChannelKey(Fir, "lip"), At(at))?.Id);

    [Fact]
    public void CertificateInForce_takes_the_highest_revision_of_the_latest_certificate()
    {
        Certificate first = Sample.Certificates.Single(certificate => certificate.Id == "c-1");
        LabSnapshot corrected = With(certificates: [.. Sample.Certificates, first with { Revision = 2 }, first with { Id = "c-9", ValidFrom = At("2027-01-01T00:00:00Z") }]);

        Assert.Equal(2, corrected.CertificateInForce(new ChannelKey(Fir, "well-1"), At("2026-06-01T00:00:00Z"))!.Revision);
        Assert.Equal("c-9", corrected.CertificateInForce(new ChannelKey(Fir, "well-1"), At("2027-06-01T00:00:00Z"))!.Id);
    }

    [Fact]
    public void LimitInForce_respects_set_point_band_date_and_revision()
    {
        AcceptanceLimit wide = Sample.Limits[0];
        AcceptanceLimit low = wide with { Id = "low", MinimumCelsius = -20, MaximumCelsius = 0, Maximum = 30, EffectiveFrom = At("2026-03-01T00:00:00Z") };
        AcceptanceLimit band = wide with { Id = "band", Band = "lw", Maximum = 15 };
        LabSnapshot snapshot = With(limits: [wide, wide with { Revision = 2, Maximum = 18 }, low, band]);

        Assert.Equal(18, Limit(snapshot, 50, null, "2026-06-01T00:00:00Z"));
        Assert.Equal(30, Limit(snapshot, -10, null, "2026-06-01T00:00:00Z"));
        Assert.Equal(18, Limit(snapshot, -10, null, "2026-02-01T00:00:00Z"));
        Assert.Equal(15, Limit(snapshot, 50, "lw", "2026-06-01T00:00:00Z"));
        Assert.Null(snapshot.LimitInForce(Fir, CriterionCode.Purge, 50, null, At("2026-06-01T00:00:00Z")));
        Assert.Null(snapshot.LimitInForce(Fir, CriterionCode.Stability, 50, null, At("2025-06-01T00:00:00Z")));
        Assert.Equal(DecisionRule.GuardBand, wide.Rule);
    }

    private static double? Limit(LabSnapshot snapshot, double setPoint, string? band, string at) =>
        snapshot.LimitInForce(Fir, CriterionCode.Stability, setPoint, band, At(at))?.Maximum;

    private static LabSnapshot With(IReadOnlyList<Certificate>? certificates = null, IReadOnlyList<AcceptanceLimit>? limits = null) =>
        new(Sample.Site, Sample.Sources, Sample.Instruments, Sample.Installations, certificates ?? Sample.Certificates, limits ?? Sample.Limits, Sample.Notifiers);

    private static Instant At(string text) => Instant.TryParse(text, out Instant instant) ? instant : throw new ArgumentException(text);
}
