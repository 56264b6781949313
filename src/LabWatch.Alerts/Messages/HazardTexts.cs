using LabWatch.Alerts.Hazards;
using LabWatch.Alerts.LifeCycle;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Time;
using LabWatch.Metrology.Hazards;

namespace LabWatch.Alerts.Messages;

/// <summary>Puts hazards into words: what is known and not more, what to do, what not to do, and the caution line.</summary>
internal sealed class HazardTexts(SiteTime time)
{
    private const int NameLength = 40;
    private const int ShortNameLength = 24;
    private const double LongestOutlook = 30 * 86_400d;

    /// <summary>A surface at or above its limit.</summary>
    public AlertCondition HotSurface(HazardChannel channel, SurfaceLimit limit, double celsius, double raw, Instant at) => new(
        Key(channel, HazardCode.HotSurface), true, at, AlertPriority.High, HotSurfaceHeadline(channel, limit, celsius),
        Detail(
            channel, Phrase.Fill(AlertTexts.HotSurfaceWhat, Phrase.Celsius(celsius), How(channel, raw), Phrase.Celsius(limit.Celsius), From(limit)) + Trend(channel),
            at, AlertTexts.HotSurfaceDo, AlertTexts.HotSurfaceDoNot),
        celsius, limit.Celsius, "Cel");

    /// <summary>The headline of a surface at or above its limit.</summary>
    public static string HotSurfaceHeadline(HazardChannel channel, SurfaceLimit limit, double celsius) =>
        Headline(channel, AlertTexts.HotSurfaceHeadline, NameLength, Phrase.Celsius(celsius), Phrase.Celsius(limit.Celsius));

    /// <summary>A surface that has fallen below its limit.</summary>
    public AlertCondition HotSurfaceReturned(HazardChannel channel, SurfaceLimit limit, double celsius, double raw, Instant at) => new(
        Key(channel, HazardCode.HotSurface), false, at, AlertPriority.High,
        Headline(channel, AlertTexts.HotSurfaceReturnedHeadline, ShortNameLength, Phrase.Celsius(celsius), Phrase.Celsius(limit.Celsius)),
        Detail(
            channel, Phrase.Fill(AlertTexts.HotSurfaceReturnedWhat, Phrase.Celsius(celsius), How(channel, raw), Phrase.Celsius(limit.Celsius), From(limit)),
            at, AlertTexts.HotSurfaceReturnedDo, AlertTexts.HotSurfaceDoNot),
        celsius, limit.Celsius, "Cel");

    /// <summary>A hazard channel from which nothing valid comes.</summary>
    public AlertCondition Silent(HazardChannel channel, TimeSpan silence, Instant at) => new(
        Key(channel, HazardCode.HazardSilent), true, at, AlertPriority.High,
        Headline(channel, AlertTexts.SilentHeadline, NameLength, Phrase.Duration(silence)),
        Detail(
            channel, Phrase.Fill(AlertTexts.SilentWhat, Phrase.Duration(silence), Phrase.Duration(channel.Channel.Interval), Last(channel)),
            channel.State.LastHeard ?? at, AlertTexts.SilentDo, AlertTexts.SilentDoNot),
        null, null, string.Empty);

    /// <summary>A hazard channel whose readings are all too old to judge by.</summary>
    public AlertCondition OnlyOld(HazardChannel channel, TimeSpan oldest, Instant at) => new(
        Key(channel, HazardCode.HazardSilent), true, at, AlertPriority.High,
        Headline(channel, AlertTexts.SilentOldHeadline, ShortNameLength),
        Detail(channel, Phrase.Fill(AlertTexts.SilentOldWhat, Phrase.Duration(oldest), Last(channel)), at, AlertTexts.SilentDo, AlertTexts.SilentDoNot),
        null, null, string.Empty);

    /// <summary>A hazard channel that speaks again.</summary>
    public AlertCondition SilenceEnded(HazardChannel channel, Instant at) => new(
        Key(channel, HazardCode.HazardSilent), false, at, AlertPriority.High,
        Headline(channel, AlertTexts.SilentReturnedHeadline, NameLength),
        Detail(channel, AlertTexts.SilentReturnedWhat, at, AlertTexts.SilentReturnedDo, AlertTexts.SilentDoNot),
        null, null, string.Empty);

    /// <summary>A hazard that a check has found.</summary>
    public AlertCondition Found(HazardCheck check, in HazardVerdict verdict, Instant at) => About(
        check, verdict, present: true, at, "Headline", "Do", null);

    /// <summary>A hazard that a check finds no more.</summary>
    public AlertCondition Gone(HazardCheck check, in HazardVerdict verdict, Instant at) => About(
        check, verdict, present: false, at, "Returned", string.Empty, AlertTexts.HazardReturnedDo);

    private AlertCondition About(HazardCheck check, in HazardVerdict verdict, bool present, Instant at, string headline, string part, string? @do)
    {
        HazardChannel subject = check.Subject;
        object[] values =
        [
            Phrase.Cut(subject.Source.Name, ShortNameLength), Phrase.Cut(subject.Channel.Name, ShortNameLength),
            Number(verdict.Value, verdict.Unit), Number(verdict.Limit, verdict.Unit), Number(verdict.Besides, string.Empty),
        ];
        string what = present
            ? Phrase.Fill(AlertTexts.Of(verdict.Cause, "What"), values) + Trend(subject)
            : Phrase.Fill(AlertTexts.Of(verdict.Cause, headline), values);
        return new AlertCondition(
            check.Key, present, at, AlertPriority.High, Phrase.Headline(AlertTexts.Of(verdict.Cause, headline), values),
            Detail(subject, what, at, @do ?? AlertTexts.Of(verdict.Cause, part), AlertTexts.Of(verdict.Cause, "DoNot")),
            NoNaN(verdict.Value), NoNaN(verdict.Limit), verdict.Unit);
    }

    /// <summary>When a sensor is expected to fall below its limit, in words; null where that cannot be told.</summary>
    public static string? Outlook(CoolingForecast? forecast, double limit) => forecast is null
        ? null
        : Phrase.Fill(
            AlertTexts.Outlook, Phrase.Celsius(limit), Phrase.Duration(TimeSpan.FromSeconds(Math.Min(forecast.SecondsToThreshold.Value, LongestOutlook))),
            Phrase.Duration(TimeSpan.FromSeconds(Math.Min(forecast.EarliestSeconds, LongestOutlook))),
            Phrase.Duration(TimeSpan.FromSeconds(Math.Min(forecast.LatestSeconds, LongestOutlook))));

    private static string Trend(HazardChannel channel)
    {
        if (!channel.IsThermometer || channel.State.History?.Trend() is not { } trend)
        {
            return string.Empty;
        }

        string text = trend.Kelvin >= 0 ? AlertTexts.TrendRising : AlertTexts.TrendFalling;
        return " " + Phrase.Fill(text, Phrase.Celsius(Math.Abs(trend.Kelvin)), Phrase.Duration(TimeSpan.FromSeconds(trend.Seconds)));
    }

    private static string Number(double value, string unit) => double.IsNaN(value)
        ? AlertTexts.NotKnown
        : unit is "Cel" or "K" ? Phrase.Celsius(value) : Phrase.Number(value);

    private static double? NoNaN(double value) => double.IsFinite(value) ? value : null;

    /// <summary>A channel with a standing hazard that the lab file does not name as a hazard channel any more.</summary>
    public AlertCondition NotWatched(AlertKey key, string sourceName, string channelName, Instant at) => new(
        key, false, at, AlertPriority.High,
        Phrase.Headline(AlertTexts.NotWatchedHeadline, Phrase.Cut(sourceName, ShortNameLength), Phrase.Cut(channelName, ShortNameLength)),
        Detail(
            AlertTexts.NotWatchedWhat, Phrase.Fill(AlertTexts.Where, sourceName, key.Source, channelName, key.Subject),
            at, AlertTexts.NotWatchedDo, AlertTexts.SilentDoNot),
        null, null, string.Empty);

    private static AlertKey Key(HazardChannel channel, string code) => new(channel.Source.Key, code, channel.Channel.Id);

    private static string Headline(HazardChannel channel, string text, int nameLength, params ReadOnlySpan<object?> more) =>
        Phrase.Headline(text, [Phrase.Cut(channel.Source.Name, nameLength), Phrase.Cut(channel.Channel.Name, nameLength), .. more]);

    private string Detail(HazardChannel channel, string what, Instant since, string @do, string doNot) => Detail(
        what, Phrase.Fill(AlertTexts.Where, channel.Source.Name, channel.Source.Key, channel.Channel.Name, channel.Channel.Id), since, @do, doNot);

    private string Detail(string what, string where, Instant since, string @do, string doNot) =>
        Phrase.Fill(AlertTexts.Layout, what, where, time.Write(since), @do, doNot, AlertTexts.Caution);

    private static string How(HazardChannel channel, double raw) => channel.Thermometer.Certificate is not { } certificate
        ? AlertTexts.ReadAsIndicated
        : Phrase.Fill(
            channel.Thermometer.IsInRange(raw) ? AlertTexts.ReadByCertificate : AlertTexts.ReadOutsideCertificate, certificate.Id, certificate.Revision);

    private static string From(SurfaceLimit limit) => limit.IsLaboratoryLimit
        ? AlertTexts.LimitOfLaboratory
        : Phrase.Fill(AlertTexts.LimitOfStandard, Material(limit.Material), Phrase.Duration(limit.ContactTime));

    private static string Material(SurfaceMaterial material) => material switch
    {
        SurfaceMaterial.UncoatedMetal => AlertTexts.MaterialUncoatedMetal,
        SurfaceMaterial.CoatedMetal => AlertTexts.MaterialCoatedMetal,
        SurfaceMaterial.CeramicGlassStone => AlertTexts.MaterialCeramicGlassStone,
        SurfaceMaterial.Plastic => AlertTexts.MaterialPlastic,
        SurfaceMaterial.Wood => AlertTexts.MaterialWood,
        _ => AlertTexts.MaterialUnknown,
    };

    private string Last(HazardChannel channel) => channel.State.LastHeard is not { } heard
        ? AlertTexts.SilentNeverHeard
        : double.IsNaN(channel.State.LastCelsius)
            ? Phrase.Fill(AlertTexts.SilentLastHeard, time.Write(heard))
            : Phrase.Fill(AlertTexts.SilentLastValue, Phrase.Celsius(channel.State.LastCelsius), time.Write(heard));
}
