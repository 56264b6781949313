namespace LabWatch.Intake.Payloads;

/// <summary>
/// Codes of the findings that refuse a message, a record or a reading. They are part of what is kept in quarantine and never change
/// meaning; the reference page lists each with its cure.
/// </summary>
public static class IntakeCode
{
    /// <summary>The topic does not start with the configured root.</summary>
    public const string TopicOutsideRoot = "topic-outside-root";

    /// <summary>A level of the topic starts with a dollar sign.</summary>
    public const string TopicReserved = "topic-reserved";

    /// <summary>The topic has fewer or more levels than root, site, source and, at most, channel.</summary>
    public const string TopicLevels = "topic-levels";

    /// <summary>The lab file has no such source.</summary>
    public const string UnknownSource = "unknown-source";

    /// <summary>The source has no such channel.</summary>
    public const string UnknownChannel = "unknown-channel";

    /// <summary>The payload is longer than the limit.</summary>
    public const string PayloadTooLarge = "payload-too-large";

    /// <summary>The payload is empty.</summary>
    public const string PayloadEmpty = "payload-empty";

    /// <summary>The payload is not UTF-8.</summary>
    public const string NotUtf8 = "not-utf-8";

    /// <summary>The payload is neither SenML (JSON or CBOR) nor, on a channel's topic, a bare number.</summary>
    public const string NotSenml = "not-senml";

    /// <summary>The payload breaks the grammar of JSON or is nested too deeply.</summary>
    public const string MalformedJson = "malformed-json";

    /// <summary>The payload breaks the grammar of CBOR or is nested too deeply.</summary>
    public const string MalformedCbor = "malformed-cbor";

    /// <summary>The pack holds more records than the limit.</summary>
    public const string TooManyRecords = "too-many-records";

    /// <summary>The pack states a version of SenML that is not understood.</summary>
    public const string UnknownVersion = "unknown-version";

    /// <summary>Records of the pack state different versions.</summary>
    public const string VersionDiffers = "version-differs";

    /// <summary>The pack has a field that must be understood (its label ends with an underscore) and is not.</summary>
    public const string MustUnderstand = "must-understand";

    /// <summary>A label stands twice in one record.</summary>
    public const string DuplicateLabel = "duplicate-label";

    /// <summary>A field has a value of the wrong kind.</summary>
    public const string WrongType = "wrong-type";

    /// <summary>The resolved name is longer than any channel id.</summary>
    public const string NameTooLong = "name-too-long";

    /// <summary>A mapped message has nothing where the mapping points to.</summary>
    public const string MappedMissing = "mapped-missing";

    /// <summary>The record has no value.</summary>
    public const string MissingValue = "missing-value";

    /// <summary>The record has more than one value field.</summary>
    public const string SeveralValues = "several-values";

    /// <summary>The value is a text or data; readings are numbers.</summary>
    public const string ValueNotNumber = "value-not-number";

    /// <summary>The value is beyond the range of a double.</summary>
    public const string ValueOutOfRange = "value-out-of-range";

    /// <summary>The record has a sum and no value; sums are not stored.</summary>
    public const string SumWithoutValue = "sum-without-value";

    /// <summary>The unit is none that is known.</summary>
    public const string UnknownUnit = "unknown-unit";

    /// <summary>A value in this unit cannot become one in the channel's: they measure different things.</summary>
    public const string UnitMismatch = "unit-mismatch";

    /// <summary>The time cannot be represented.</summary>
    public const string TimeOutOfRange = "time-out-of-range";

    /// <summary>The device time lies further in the future than permitted.</summary>
    public const string TimeInTheFuture = "time-in-the-future";

    /// <summary>The device time lies before the earliest time permitted: a clock that was never set.</summary>
    public const string TimeTooEarly = "time-too-early";

    /// <summary>The device time lies longer ago than permitted: a clock that was set back.</summary>
    public const string TimeTooOld = "time-too-old";

    /// <summary>The device's clock has leapt against the clock here.</summary>
    public const string ClockLeap = "clock-leap";

    /// <summary>A retained message without a device time: nobody knows when it was measured.</summary>
    public const string RetainedWithoutTime = "retained-without-time";

    /// <summary>Another value stands for the same source, channel and time.</summary>
    public const string ConflictingValue = "conflicting-value";

    /// <summary>The store refused this pack while it took others.</summary>
    public const string StoreRefused = "store-refused";

    /// <summary>The decoder failed: a defect of this program.</summary>
    public const string DecoderDefect = "decoder-defect";

    /// <summary>More findings than are listed.</summary>
    public const string MoreFindings = "more-findings";
}
