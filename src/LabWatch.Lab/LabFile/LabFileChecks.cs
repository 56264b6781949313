using LabWatch.Lab.Alerts;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Identity;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Limits;
using LabWatch.Lab.Sources;

namespace LabWatch.Lab.LabFile;

/// <summary>What no single section of a lab file can see: ids that repeat, references that lead nowhere, stays that overlap.</summary>
internal static class LabFileChecks
{
    public static void Run(
        IReadOnlyList<ReferenceSource> sources,
        IReadOnlyList<Placed<ReferenceSource>> formerSources,
        InstrumentSection.Instruments instruments,
        IReadOnlyList<AcceptanceLimit> limits,
        IReadOnlyList<Notifier> notifiers,
        List<Finding> findings)
    {
        Unique(findings, "/sources", sources.Select(source => source.Key.Source));
        Unique(findings, "/instruments", instruments.All.Select(instrument => instrument.Id));
        Unique(findings, "/limits", limits.Select(limit => $"{limit.Id}@{limit.Revision}"));
        Unique(findings, "/notifiers", notifiers.Select(notifier => notifier.Id));
        UniqueCertificates(findings, instruments);
        Unique(findings, "/instruments/*/triplePointChecks", instruments.TriplePointChecks.Select(check => $"{check.Id}@{check.Revision}"));
        for (int i = 0; i < sources.Count; i++)
        {
            CheckSource(findings, sources[i], $"/sources/{i}");
        }

        foreach ((ReferenceSource former, string pointer) in formerSources)
        {
            CheckSource(findings, former, pointer);
        }

        // What is on record may refer to what a source was before.
        IReadOnlyList<ReferenceSource> known = [.. sources, .. formerSources.Select(former => former.Value)];
        CheckInstruments(findings, known, instruments);
        CheckLimits(findings, known, limits);
    }

    private static void CheckSource(List<Finding> findings, ReferenceSource source, string pointer)
    {
        Unique(findings, pointer + "/channels", source.Channels.Select(channel => channel.Id));
        Unique(findings, pointer + "/bands", source.Bands.Select(band => band.Id));
        HashSet<string> bands = [.. source.Bands.Select(band => band.Id)];
        string bandCure = $"Use one of the source's bands: {string.Join(", ", bands)}.";
        for (int i = 0; i < source.Cavity.Coating.Count; i++)
        {
            Known(findings, bands, source.Cavity.Coating[i].Band, $"{pointer}/cavity/coating/{i}/band", "band", bandCure);
        }

        foreach (string band in bands.Except(source.Cavity.Coating.Select(coating => coating.Band)))
        {
            findings.Add(new Finding("missing", pointer + "/cavity/coating", "A working band has no coating emissivity.", band, "Add an entry for that band."));
        }

        for (int i = 0; i < source.Channels.Count; i++)
        {
            CheckChannel(findings, source, i, pointer, bands, bandCure);
        }

        CheckRadiance(findings, source, pointer, bands, bandCure);
        CheckBalances(findings, source, pointer);
        int references = source.Channels.Count(channel => channel.IsReference);
        if (references > 1 || (references == 0 && source.Route == TraceabilityRoute.Contact))
        {
            findings.Add(new Finding(
                "reference-channel", pointer + "/channels", "Exactly one well thermometer must be the reference on the contact route, at most one on the radiometric route.",
                FormattableString.Invariant($"{references}"), "Set \"reference\": true on the one that gives the source's temperature."));
        }
    }

    private static void CheckRadiance(List<Finding> findings, ReferenceSource source, string pointer, HashSet<string> bands, string bandCure)
    {
        for (int i = 0; i < source.Claimed.Count; i++)
        {
            if (source.Claimed[i].Band is { } claimed)
            {
                Known(findings, bands, claimed, $"{pointer}/claimed/{i}/band", "band", bandCure);
            }
        }

        for (int i = 0; i < source.Baselines.Count; i++)
        {
            Known(findings, bands, source.Baselines[i].Band, $"{pointer}/baselines/{i}/band", "band", bandCure);
        }

        if (source.View is { } view && source.Cavity.Shape != CavityShape.FlatPlate && view.SpotRadiusMillimetre > source.Cavity.ApertureRadiusMillimetre)
        {
            findings.Add(new Finding(
                "spot-too-wide", pointer + "/view/spotRadiusMillimetre", "The spot is wider than the aperture.", FormattableString.Invariant($"{view.SpotRadiusMillimetre}"),
                "Give the radius of what the detector sees in the aperture plane, at most that of the aperture."));
        }
    }

    private static void CheckBalances(List<Finding> findings, ReferenceSource source, string pointer)
    {
        Unique(findings, pointer + "/balances", source.Balances.Select(balance => balance.Channel));
        for (int i = 0; i < source.Balances.Count; i++)
        {
            if (source.FindChannel(source.Balances[i].Channel) is not { IsReference: false, Quantity: ChannelQuantity.HeaterPower or ChannelQuantity.WellThermometer })
            {
                findings.Add(new Finding(
                    "balance-channel", $"{pointer}/balances/{i}/channel", "A balance is of the heater power or of a well thermometer that is not the reference.", Finding.Quote(source.Balances[i].Channel),
                    "Use the id of such a channel of this source."));
            }
        }
    }

    private static void CheckChannel(List<Finding> findings, ReferenceSource source, int index, string pointer, HashSet<string> bands, string bandCure)
    {
        Channel channel = source.Channels[index];
        string at = $"{pointer}/channels/{index}";
        bool isComparator = channel.Quantity is ChannelQuantity.ComparatorTemperature or ChannelQuantity.ComparatorSignal;
        if (channel.Band is not null)
        {
            Known(findings, bands, channel.Band, at + "/band", "band", bandCure);
        }
        else if (isComparator)
        {
            findings.Add(new Finding("missing", at + "/band", "A comparator channel needs its working band.", null, bandCure));
        }

        if (channel.IsReference && channel.Quantity != ChannelQuantity.WellThermometer)
        {
            findings.Add(new Finding("reference-channel", at + "/reference", "Only a well thermometer can be the reference.", channel.Id, "Move \"reference\" to a well-thermometer channel."));
        }

        if (channel.Quantity == ChannelQuantity.WellThermometer && channel.AxialPositionMillimetre is null)
        {
            findings.Add(new Finding("missing", at + "/axialPositionMillimetre", "A well needs its place on the axis.", null, "Give the distance of the sensing element from the aperture plane."));
        }

        if (channel.ReferenceJunction?.Channel is { } junction && source.FindChannel(junction) is not { Unit: "Cel" or "Ohm" })
        {
            findings.Add(new Finding(
                "reference-junction", at + "/referenceJunction/channel", "The reference junctions are not measured by a channel of this source that is read in Cel or Ohm.", Finding.Quote(junction),
                "Name a channel of the quantity reference-junction, or another thermometer at the junctions that is no thermocouple itself."));
        }

        if (channel.Contact is not null && channel.Quantity is not (ChannelQuantity.OuterSurface or ChannelQuantity.ApertureLip))
        {
            findings.Add(new Finding("not-a-surface", at + "/contact", "Only an outer surface or the aperture lip can be touched.", channel.Id, "Remove \"contact\" or correct the quantity."));
        }
    }

    private static void CheckInstruments(List<Finding> findings, IReadOnlyList<ReferenceSource> sources, InstrumentSection.Instruments instruments)
    {
        ILookup<ChannelKey, Channel> channels = sources.SelectMany(source => source.Channels).ToLookup(channel => channel.Key);

        foreach ((Certificate certificate, string pointer) in instruments.Certificates.Select(placed => (placed.Value, placed.Pointer)))
        {
            if (certificate.CalibratedAgainst is { } against && !sources.Any(source => source.Key == against))
            {
                findings.Add(new Finding("unknown-reference", pointer + "/calibratedAgainst", "This source does not exist.", against.Source, "Use the id of a source of this file, or leave it out."));
            }
        }

        foreach ((Installation stay, string pointer) in instruments.Installations.Select(placed => (placed.Value, placed.Pointer)))
        {
            if (channels.Contains(stay.Channel))
            {
                CheckUnits(findings, instruments, stay.Instrument, stay.Channel, [.. channels[stay.Channel].Select(channel => channel.Unit).Distinct()]);
            }
            else
            {
                findings.Add(new Finding("unknown-reference", pointer, "This channel does not exist.", stay.Channel.ToString(), "Use ids of a source and a channel of this file."));
            }
        }

        foreach (IGrouping<ChannelKey, Placed<Installation>> group in instruments.Installations.GroupBy(stay => stay.Value.Channel))
        {
            Overlaps(findings, [.. group.OrderBy(stay => stay.Value.From)], $"Two instruments are in {group.Key} at once.");
        }

        foreach (IGrouping<string, Placed<Installation>> group in instruments.Installations.GroupBy(stay => stay.Value.Instrument))
        {
            Overlaps(findings, [.. group.OrderBy(stay => stay.Value.From)], $"The instrument {group.Key} is in two places at once.");
        }
    }

    private static void CheckUnits(List<Finding> findings, InstrumentSection.Instruments instruments, string instrument, ChannelKey channel, string[] units)
    {
        foreach ((Certificate certificate, string pointer) in instruments.Certificates.Select(placed => (placed.Value, placed.Pointer)))
        {
            bool isOther = !string.Equals(certificate.Instrument, instrument, StringComparison.Ordinal);
            bool isUnread = double.IsNaN(certificate.Characteristic.CoverageFactor);
            if (!isOther && !isUnread && !units.Contains(certificate.Characteristic.RawUnit, StringComparer.Ordinal))
            {
                findings.Add(new Finding(
                    "unit-mismatch", pointer + "/characteristic", $"The characteristic takes {certificate.Characteristic.RawUnit}, but {channel} is read in {units[0]}.",
                    units[0], "Correct the channel's unit or the certificate's characteristic."));
            }
        }
    }

    private static void Overlaps(List<Finding> findings, Placed<Installation>[] stays, string message)
    {
        for (int i = 1; i < stays.Length; i++)
        {
            if (stays[i - 1].Value.Until is not { } end || end > stays[i].Value.From)
            {
                findings.Add(new Finding(
                    "overlap", stays[i].Pointer + "/from", message, stays[i].Value.From.ToString(), $"End the stay at {stays[i - 1].Pointer} before this one begins."));
            }
        }
    }

    private static void CheckLimits(List<Finding> findings, IReadOnlyList<ReferenceSource> sources, IReadOnlyList<AcceptanceLimit> limits)
    {
        for (int i = 0; i < limits.Count; i++)
        {
            AcceptanceLimit limit = limits[i];
            ReferenceSource[] revisions = [.. sources.Where(candidate => candidate.Key == limit.Source)];
            if (revisions.Length == 0)
            {
                findings.Add(new Finding("unknown-reference", $"/limits/{i}/source", "This source does not exist.", limit.Source.Source, "Use the id of a source of this file."));
            }
            else if (limit.Band is not null)
            {
                Known(findings, [.. revisions.SelectMany(source => source.Bands).Select(band => band.Id)], limit.Band, $"/limits/{i}/band", "band", "Use one of the source's bands.");
            }
        }
    }

    private static void UniqueCertificates(List<Finding> findings, InstrumentSection.Instruments instruments)
    {
        Unique(findings, "/instruments/*/certificates", instruments.Certificates.Select(placed => $"{placed.Value.Id}@{placed.Value.Revision}"));
        foreach (IGrouping<string, Certificate> group in instruments.Certificates.Select(placed => placed.Value).GroupBy(certificate => certificate.Id))
        {
            if (group.Select(certificate => certificate.Instrument).Distinct(StringComparer.Ordinal).Count() > 1)
            {
                findings.Add(new Finding("repeated-id", "/instruments/*/certificates", "One certificate id belongs to two instruments.", group.Key, "Give each certificate an id of its own."));
            }
        }
    }

    private static void Known(List<Finding> findings, HashSet<string> known, string id, string where, string what, string cure)
    {
        if (!known.Contains(id))
        {
            findings.Add(new Finding("unknown-reference", where, $"This {what} does not exist.", Finding.Quote(id), cure));
        }
    }

    private static void Unique(List<Finding> findings, string where, IEnumerable<string> ids)
    {
        foreach (IGrouping<string, string> group in ids.Where(id => id.Length > 0).GroupBy(id => id, StringComparer.Ordinal).Where(group => group.Count() > 1))
        {
            findings.Add(new Finding("repeated-id", where, "This id stands more than once.", Finding.Quote(group.Key), "Give each entry an id (or revision) of its own; ids are never reused."));
        }
    }
}
