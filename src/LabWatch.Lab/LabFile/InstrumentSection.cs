using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;

namespace LabWatch.Lab.LabFile;

/// <summary>The member <c>instruments</c> of a lab file, with the stays and certificates of each.</summary>
internal static class InstrumentSection
{
    /// <summary>What the section holds.</summary>
    public sealed record Instruments(
        IReadOnlyList<Instrument> All, IReadOnlyList<Placed<Installation>> Installations, IReadOnlyList<Placed<Certificate>> Certificates, IReadOnlyList<TriplePointCheck> TriplePointChecks);

    public static Instruments Read(JsonCursor top, string site)
    {
        List<Instrument> instruments = [];
        List<Placed<Installation>> installations = [];
        List<Placed<Certificate>> certificates = [];
        List<TriplePointCheck> checks = [];
        foreach (JsonCursor item in top.Items("instruments", required: false))
        {
            item.OnlyMembers("id", "serialNumber", "description", "installations", "certificates", "triplePointChecks", "triplePointIntervalDays");
            Instrument instrument = new(item.Id("id"), item.Text("serialNumber"), item.Text("description"))
            {
                TriplePointInterval = item.OptionalNumber("triplePointIntervalDays", 1, 4000) is { } days && double.IsFinite(days) ? TimeSpan.FromDays(days) : null,
            };
            instruments.Add(instrument);
            installations.AddRange(item.Items("installations", required: false).Select(stay => new Placed<Installation>(Stay(stay, instrument.Id, site), stay.Pointer)));
            certificates.AddRange(item.Items("certificates", required: false).Select(certificate => new Placed<Certificate>(Certificate(certificate, instrument.Id, site), certificate.Pointer)));
            checks.AddRange(item.Items("triplePointChecks", required: false).Select(check => TriplePoint(check, instrument.Id)));
        }

        return new Instruments(instruments, installations, certificates, checks);
    }

    private static TriplePointCheck TriplePoint(JsonCursor item, string instrument)
    {
        item.OnlyMembers("id", "revision", "at", "triplePointOhm");
        return new TriplePointCheck(
            item.Id("id"), item.PositiveInteger("revision"), instrument, item.Time("at"), item.Estimate("triplePointOhm", 0.05, 1000));
    }

    private static Installation Stay(JsonCursor item, string instrument, string site)
    {
        item.OnlyMembers("source", "channel", "from", "until");
        Installation stay = new(
            instrument, new ChannelKey(new SourceKey(site, item.Id("source")), item.Id("channel")), item.Time("from"), item.OptionalTime("until"));
        if (stay.Until <= stay.From)
        {
            item.Report("empty-range", "The stay ends before it begins.", "Correct one of the two times.", "until");
        }

        return stay;
    }

    private static Certificate Certificate(JsonCursor item, string instrument, string site)
    {
        item.OnlyMembers("id", "revision", "number", "issuer", "validFrom", "dueAt", "range", "characteristic", "calibratedAgainst");
        (double minimum, double maximum) = SourceSection.Range(item) ?? (double.NaN, double.NaN);
        Certificate certificate = new(
            item.Id("id"),
            item.PositiveInteger("revision"),
            instrument,
            item.Text("number"),
            item.Text("issuer"),
            item.Time("validFrom"),
            item.OptionalTime("dueAt"),
            minimum,
            maximum,
            CharacteristicSection.Read(item))
        {
            CalibratedAgainst = item.OptionalText("calibratedAgainst") is null ? null : new SourceKey(site, item.Id("calibratedAgainst")),
        };
        if (certificate.DueAt <= certificate.ValidFrom)
        {
            item.Report("empty-range", "The certificate is due before it is valid.", "Correct one of the two times.", "dueAt");
        }

        return certificate;
    }
}
