namespace LabWatch.Lab.LabFile;

/// <summary>The kinds of entries of a lab file, each of which is a record with revisions of its own.</summary>
public enum LabRecordKind
{
    /// <summary>The site.</summary>
    Site,

    /// <summary>A source with its cavity, bands and channels.</summary>
    Source,

    /// <summary>An instrument, without its stays and certificates.</summary>
    Instrument,

    /// <summary>An instrument's stay in a channel.</summary>
    Installation,

    /// <summary>A calibration certificate; it carries its revision itself.</summary>
    Certificate,

    /// <summary>A measurement in a triple-point-of-water cell; it carries its revision itself.</summary>
    TriplePointCheck,

    /// <summary>An acceptance limit; it carries its revision itself.</summary>
    Limit,

    /// <summary>A way to tell somebody.</summary>
    Notifier,
}
