using System.Resources;
using System.Runtime.CompilerServices;

namespace LabWatch.Alerts.Messages;

/// <summary>The texts of <c>AlertTexts.resx</c>; its comments say what the placeholders stand for.</summary>
internal static class AlertTexts
{
    private static readonly ResourceManager Resources = new(typeof(AlertTexts));

    public static string Caution => Text();

    public static string Layout => Text();

    public static string PlainLayout => Text();

    public static string Where => Text();

    public static string WhereSource => Text();

    public static string WhereService => Text();

    public static string ServiceReturnedDo => Text();

    public static string HotSurfaceHeadline => Text();

    public static string HotSurfaceWhat => Text();

    public static string HotSurfaceDo => Text();

    public static string HotSurfaceDoNot => Text();

    public static string HotSurfaceReturnedHeadline => Text();

    public static string HotSurfaceReturnedWhat => Text();

    public static string HotSurfaceReturnedDo => Text();

    public static string ReadAsIndicated => Text();

    public static string ReadByCertificate => Text();

    public static string ReadOutsideCertificate => Text();

    public static string LimitOfLaboratory => Text();

    public static string LimitOfStandard => Text();

    public static string MaterialUnknown => Text();

    public static string MaterialUncoatedMetal => Text();

    public static string MaterialCoatedMetal => Text();

    public static string MaterialCeramicGlassStone => Text();

    public static string MaterialPlastic => Text();

    public static string MaterialWood => Text();

    public static string SilentHeadline => Text();

    public static string SilentWhat => Text();

    public static string SilentOldHeadline => Text();

    public static string SilentOldWhat => Text();

    public static string SilentLastValue => Text();

    public static string SilentLastHeard => Text();

    public static string SilentNeverHeard => Text();

    public static string SilentDo => Text();

    public static string SilentDoNot => Text();

    public static string SilentReturnedHeadline => Text();

    public static string SilentReturnedWhat => Text();

    public static string SilentReturnedDo => Text();

    public static string NotWatchedHeadline => Text();

    public static string NotWatchedWhat => Text();

    public static string NotWatchedDo => Text();

    public static string ToleranceHeadline => Text();

    public static string ToleranceHeadlineNoValue => Text();

    public static string ToleranceWhat => Text();

    public static string ToleranceDo => Text();

    public static string ToleranceReturnedHeadline => Text();

    public static string ToleranceReturnedDo => Text();

    public static string MeasuredStability => Text();

    public static string MeasuredAxialUniformity => Text();

    public static string MeasuredEffectiveEmissivity => Text();

    public static string MeasuredDataHealth => Text();

    public static string DoStability => Text();

    public static string DoAxialUniformity => Text();

    public static string DoEffectiveEmissivity => Text();

    public static string DoDataHealth => Text();

    public static string ToleranceHot => Text();

    public static string NotJudgedHeadline => Text();

    public static string NotJudgedWhat => Text();

    public static string NotJudgedDo => Text();

    public static string NotJudgedNoSource => Text();

    public static string NotJudgedNoScope => Text();

    public static string NotJudgedNoLimit => Text();

    public static string DecisionFail => Text();

    public static string DecisionConditionalFail => Text();

    public static string DecisionPass => Text();

    public static string DecisionConditionalPass => Text();

    public static string DecisionNotDecided => Text();

    public static string AcknowledgedHeadline => Text();

    public static string HazardReturnedDo => Text();

    public static string TrendRising => Text();

    public static string TrendFalling => Text();

    public static string Outlook => Text();

    public static string NotKnown => Text();

    public static string PushTitleHazard => Text();

    public static string PushTitleAlert => Text();

    public static string PushTitleTest => Text();

    public static string TestHeadline => Text();

    public static string TestDetail => Text();

    public static string MailAcknowledge => Text();

    public static string MailLook => Text();

    public static string NoReadingsHeadline => Text();

    public static string NoReadingsWhat => Text();

    public static string NoReadingsDo => Text();

    public static string NoReadingsReturned => Text();

    public static string ShelvedHeadline => Text();

    public static string UnshelvedHeadline => Text();

    public static string ShelfEnded => Text();

    public static string SummaryHeadline => Text();

    public static string SummaryDetail => Text();

    public static string SummaryMore => Text();

    /// <summary>A text about a hazard of a source.</summary>
    public static string Of(Hazards.HazardCause cause, string part) => Text(cause.ToString() + part);

    private static string Text([CallerMemberName] string name = "") =>
        Resources.GetString(name, System.Globalization.CultureInfo.InvariantCulture) ?? throw new MissingManifestResourceException(name);
}
