using System.Text;
using LabWatch.Lab;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Simulator;
using LabWatch.Simulator.Sources;

namespace LabWatch.Tests.Simulator;

public sealed class DemoLabFileTests
{
    private static readonly Instant FirstStart = Instant.From(new DateTimeOffset(2027, 3, 14, 9, 30, 0, TimeSpan.Zero));

    private static LabSnapshot Read(string text)
    {
        LabFileResult result = LabFileReader.Read(Encoding.UTF8.GetBytes(text));
        Assert.Empty(result.Findings);
        return result.Snapshot!;
    }

    [Fact]
    public void LabFile_AsWritten_HasNoFindings() => Assert.Equal(DemoLab.Site, Read(DemoLab.LabFileText).Site.Id);

    [Fact]
    public void LabFileFor_LaterStart_MovesEveryDateByTheSameWholeDays()
    {
        LabSnapshot written = Read(DemoLab.LabFileText);
        LabSnapshot moved = Read(DemoLab.LabFileFor(FirstStart));

        Assert.Equal(written.Certificates.Count, moved.Certificates.Count);
        Assert.All(written.Certificates.Zip(moved.Certificates), pair =>
        {
            Assert.Equal(TimeSpan.FromDays(133), pair.Second.ValidFrom - pair.First.ValidFrom);
            Assert.Equal(TimeSpan.FromDays(133), pair.Second.DueAt!.Value - pair.First.DueAt!.Value);
        });
    }

    [Fact]
    public void LabFileFor_SameDay_IsTheSameText() =>
        Assert.Equal(DemoLab.LabFileFor(FirstStart), DemoLab.LabFileFor(FirstStart + TimeSpan.FromHours(14)));

    [Fact]
    public void LabFile_Channels_AreThoseThatTheSimulatorSends()
    {
        LabSnapshot lab = Read(DemoLab.LabFileText);
        Assert.Equal(DemoLab.Designs.Select(design => design.Id), lab.Sources.Select(source => source.Key.Source));
        foreach (SourceDesign design in DemoLab.Designs)
        {
            ReferenceSource source = lab.FindSource(new SourceKey(DemoLab.Site, design.Id))!;
            Assert.Equal(design.Channels.Select(channel => (channel.Id, channel.Unit)), source.Channels.Select(channel => (channel.Id, channel.Unit)));
            Assert.All(source.Channels.Where(channel => channel.Quantity == ChannelQuantity.WellThermometer), channel =>
                Assert.Equal(design.Find(channel.Id)!.PositionMillimetre, channel.AxialPositionMillimetre));
        }
    }

    [Fact]
    public void LabFile_Cavities_HaveTheDimensionsOfTheSimulator()
    {
        LabSnapshot lab = Read(DemoLab.LabFileText);
        Assert.All(DemoLab.Designs, design =>
        {
            Cavity cavity = lab.FindSource(new SourceKey(DemoLab.Site, design.Id))!.Cavity;
            Assert.Equal(
                design.Cavity, new CavityDesign(cavity.RadiusMillimetre, cavity.LengthMillimetre, cavity.ApertureRadiusMillimetre, cavity.ConeHalfAngleDegree));
        });
    }

    [Fact]
    public void LabFile_ResistanceThermometers_StateTheCurveOfTheSensor()
    {
        LabSnapshot lab = Read(DemoLab.LabFileText);
        foreach (SourceDesign design in DemoLab.Designs)
        {
            foreach (ChannelDesign channel in design.Channels.Where(channel => channel.Resistance is not null))
            {
                Certificate certificate = lab.CertificateInForce(new ChannelKey(new SourceKey(DemoLab.Site, design.Id), channel.Id), FirstStart)!;
                CallendarVanDusenCharacteristic stated = Assert.IsType<CallendarVanDusenCharacteristic>(certificate.Characteristic);
                Assert.Equal(channel.Resistance, new PlatinumResistance(stated.R0Ohm, stated.A, stated.B, stated.C));

                // What the sensor is really off by is drawn from no more than the stated standard uncertainty.
                Assert.InRange(channel.ErrorKelvin, 0, stated.ExpandedUncertaintyKelvin / stated.CoverageFactor);
            }
        }
    }

    [Fact]
    public void LabFile_HiddenTruth_StandsNowhere()
    {
        SourceDesign rowan = DemoLab.Designs.First(design => design.Id == "rowan");
        HiddenTruth truth = HiddenTruth.Draw(1, rowan);
        Assert.All(truth.Emissivity.Values, value => Assert.DoesNotContain(value.ToString(System.Globalization.CultureInfo.InvariantCulture), DemoLab.LabFileText, StringComparison.Ordinal));
        Assert.NotEqual(truth.Emissivity["8-14"], HiddenTruth.Draw(2, rowan).Emissivity["8-14"]);
    }
}
