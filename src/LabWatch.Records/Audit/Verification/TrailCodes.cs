namespace LabWatch.Records.Audit.Verification;

/// <summary>Codes of findings.</summary>
public static class TrailCodes
{
    /// <summary>The database, a table or a part of one cannot be read.</summary>
    public const string Unreadable = "unreadable";

    /// <summary>An entry does not have the digest of its content.</summary>
    public const string EntryAltered = "entry-altered";

    /// <summary>A number is missing in a chain.</summary>
    public const string EntriesMissing = "entries-missing";

    /// <summary>A number stands twice in a chain.</summary>
    public const string EntryTwice = "entry-twice";

    /// <summary>An entry was chained to another one than stands before it.</summary>
    public const string LinkBroken = "link-broken";

    /// <summary>A chain does not hold an end that was noted.</summary>
    public const string HeadDiffers = "head-differs";

    /// <summary>The file of noted ends cannot be read.</summary>
    public const string HeadFileUnreadable = "head-file-unreadable";

    /// <summary>A row is not as its entry says.</summary>
    public const string RowAltered = "row-altered";

    /// <summary>A row has no entry.</summary>
    public const string RowAdded = "row-added";

    /// <summary>An entry has no row.</summary>
    public const string RowMissing = "row-missing";

    /// <summary>A derived row does not follow from what it is derived from.</summary>
    public const string DerivedDiffers = "derived-differs";

    /// <summary>A sealed part of a source-hour is not as it was sealed.</summary>
    public const string BlockAltered = "block-altered";

    /// <summary>A summary does not follow from the readings that it sums up.</summary>
    public const string SummaryDiffers = "summary-differs";
}
