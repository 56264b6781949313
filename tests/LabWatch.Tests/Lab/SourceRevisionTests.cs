using System.Text;
using LabWatch.Lab;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;

namespace LabWatch.Tests.Lab;

public sealed class SourceRevisionTests
{
    private static readonly Instant Day1 = Instant.FromUnixSeconds(1_780_000_000);
    private static readonly Instant Day2 = Day1 + TimeSpan.FromDays(1);

    private static readonly LabSnapshot Sample = LabFileReader.Read(Encoding.UTF8.GetBytes(LabFileSample.Text)).Snapshot!;
    private static readonly ReferenceSource First = Sample.Sources[0] with { Revision = 1, EffectiveFrom = Day1 };

    [Fact]
    public void The_latest_effective_revision_is_in_force_and_the_first_holds_for_all_before_it()
    {
        ReferenceSource second = First with { Revision = 2, EffectiveFrom = Day2, Name = "Fir, recoated" };
        LabSnapshot lab = With([second], [First]);
        Assert.Equal("fir@1", lab.SourceInForce(First.Key, Day1 - TimeSpan.FromDays(400))!.Reference);
        Assert.Equal("fir@1", lab.SourceInForce(First.Key, Day2 - TimeSpan.FromMicroseconds(1))!.Reference);
        Assert.Equal("fir@2", lab.SourceInForce(First.Key, Day2)!.Reference);
        Assert.Same(second, lab.FindSource(First.Key));
    }

    [Fact]
    public void A_correction_of_the_same_date_goes_before_what_it_corrects()
    {
        LabSnapshot lab = With([First with { Revision = 2 }], [First]);
        Assert.Equal(2, lab.SourceInForce(First.Key, Day1)!.Revision);
    }

    [Fact]
    public void A_withdrawn_source_is_known_for_its_past_and_not_watched()
    {
        LabSnapshot lab = With([First], [First with { Key = First.Key with { Source = "oak" } }]);
        Assert.Null(lab.FindSource(First.Key with { Source = "oak" }));
        Assert.NotNull(lab.SourceInForce(First.Key with { Source = "oak" }, Day1));
        Assert.Null(lab.SourceInForce(First.Key with { Source = "ash" }, Day1));
    }

    private static LabSnapshot With(IReadOnlyList<ReferenceSource> sources, IReadOnlyList<ReferenceSource> former) =>
        new(Sample.Site, sources, Sample.Instruments, Sample.Installations, Sample.Certificates, Sample.Limits, Sample.Notifiers) { FormerSources = former };
}
