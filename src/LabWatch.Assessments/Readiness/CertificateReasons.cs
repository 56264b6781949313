using LabWatch.Assessments.Evaluation;
using LabWatch.Lab.Instruments;
using LabWatch.Lab.Sources;

namespace LabWatch.Assessments.Readiness;

/// <summary>
/// Certificates of all instruments that a result rests on (ISO/IEC 17025:2017, 6.4.4 to 6.4.10 and 6.5). What blocks: the reference's missing one,
/// and an overdue one, or one that does not cover the set point, of any well. A comparator only checks where the source's temperature comes from a
/// well; on the radiometric route it is the standard.
/// </summary>
internal static class CertificateReasons
{
    private static readonly TimeSpan DueSoon = TimeSpan.FromDays(30);

    public static IReadOnlyList<ReadinessReason> Of(ReadinessInput input, SourceNow now) =>
    [
        .. input.Source.Channels
            .Where(channel => channel == now.Reference || channel.Quantity is ChannelQuantity.WellThermometer or ChannelQuantity.ComparatorTemperature)
            .OrderByDescending(channel => channel == now.Reference)
            .SelectMany(channel => Of(input, now, channel)),
    ];

    private static IEnumerable<ReadinessReason> Of(ReadinessInput input, SourceNow now, Channel channel)
    {
        bool isReference = channel == now.Reference;
        bool rests = isReference || channel.Quantity is ChannelQuantity.WellThermometer || input.Source.Route is TraceabilityRoute.Radiometric;
        if (input.Snapshot.CertificateInForce(channel.Key, input.Now) is not { } certificate)
        {
            yield return new(ReasonCode.Certificate, $"No certificate is in force for {channel.Id}.", isReference);
            yield break;
        }

        if (certificate.DueAt is { } due)
        {
            if (due <= input.Now)
            {
                yield return new(ReasonCode.Certificate, $"Certificate {certificate.Number} of {channel.Id} has been overdue for {Quantities.Duration(input.Now - due)}.", rests);
            }
            else if (due - input.Now < DueSoon)
            {
                yield return new(ReasonCode.Certificate, $"Certificate {certificate.Number} of {channel.Id} is due in {Quantities.Duration(due - input.Now)}.", false);
            }
        }

        double asked = double.IsNaN(now.SetPointCelsius) ? now.Celsius : now.SetPointCelsius;
        if (!now.IsOff && (asked < certificate.MinimumCelsius || asked > certificate.MaximumCelsius))
        {
            yield return new(ReasonCode.Certificate, OutOfRange(asked, certificate, channel), rests);
        }
    }

    private static string OutOfRange(double asked, Certificate certificate, Channel channel) =>
        $"{Wording.Plain(asked)} degC is outside the range of certificate {certificate.Number} of {channel.Id} "
        + $"({Wording.Plain(certificate.MinimumCelsius)} to {Wording.Plain(certificate.MaximumCelsius)} degC).";
}
