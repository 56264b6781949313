using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;

namespace LabWatch.Intake.Payloads;

/// <summary>The wording of the findings about records and packs, by code.</summary>
internal static class SenmlRefusal
{
    public static void Report(string code, string where, ReadOnlySpan<byte> value, FindingList findings)
    {
        (string message, string cure) = Wording(code);
        findings.Add(code, where, message, value, cure);
    }

    /// <summary>An instant as text; a number of microseconds where it lies beyond the years 1 to 9999.</summary>
    public static string Show(Instant time) =>
        time >= Instant.MinValue && time <= Instant.MaxValue
            ? time.ToString()
            : string.Create(System.Globalization.CultureInfo.InvariantCulture, $"{time.Microseconds} us");

    /// <summary>A message whose device's clock has leapt.</summary>
    public static Finding Leap(Instant device, Instant arrival) => new(
        IntakeCode.ClockLeap,
        "t",
        string.Create(System.Globalization.CultureInfo.InvariantCulture, $"The device's clock has leapt: it now reads {(device - arrival).TotalSeconds:F1} s against the clock here."),
        Show(device),
        "Set the device's clock. What it sent is kept here and can be sent again with the right time.");

    /// <summary>Why a unit was refused.</summary>
    public static string Unit(string code, ChannelEntry channel) =>
        code == IntakeCode.UnknownUnit ? $"The unit is not known; the channel {channel.Id} is in {channel.Unit}." : $"The channel {channel.Id} is in {channel.Unit}, which this unit cannot become.";

    private static (string Message, string Cure) Wording(string code) => code switch
    {
        IntakeCode.DuplicateLabel => ("A label stands twice in one record.", "Send each label once."),
        IntakeCode.MustUnderstand => ("The field must be understood and is not known here.", "Leave the extension out."),
        IntakeCode.VersionDiffers => ("All records of a pack must have the same version.", "State bver once, in the first record."),
        IntakeCode.UnknownVersion => ("The version of SenML is not known here.", "Send bver 10 or leave it out."),
        IntakeCode.MissingValue => ("The record has no value.", "Send v, or null for a reading without a value."),
        IntakeCode.SeveralValues => ("The record has more than one value.", "Send one of v and vb."),
        IntakeCode.ValueNotNumber => ("The value is a text or data; a reading is a number.", "Send v as a number, or vb."),
        IntakeCode.ValueOutOfRange => ("The number is too large to be kept.", "Mend the device's value."),
        IntakeCode.SumWithoutValue => ("The record has only a sum; sums are not stored.", "Send v."),
        IntakeCode.TimeOutOfRange => ("The time is too large to be one.", "Send seconds since 1970 UTC."),
        IntakeCode.TimeInTheFuture => ("The device time lies too far in the future.", "Set the device's clock."),
        IntakeCode.TimeTooOld => ("The device time lies longer ago than is taken by MQTT.", "Set the device's clock; bring old readings in with labwatch import readings."),
        IntakeCode.TimeTooEarly => ("The device time lies before any believable one.", "Set the device's clock."),
        IntakeCode.RetainedWithoutTime => ("A retained message needs a device time: nobody knows when it was measured.", "Publish readings without the retain flag, or with a time."),
        _ => ("The field has a value of the wrong kind.", "See RFC 8428 table 1 for the kind of each field."),
    };
}
