using System.Text.Json;
using LabWatch.Lab;
using LabWatch.Lab.Alerts;
using LabWatch.Lab.Identity;
using LabWatch.Records.Alerts;
using LabWatch.Service.Api.Views;

namespace LabWatch.Service.Api.Live;

/// <summary>Alerts as the API shows them.</summary>
internal static class AlertViews
{
    /// <summary>One alert with the names that the site has for its source and subject.</summary>
    public static AlertView Of(LabSnapshot lab, Alert alert) => new(
        alert.Id,
        alert.Source.ToString(),
        lab.FindSource(alert.Source)?.Name ?? alert.Source.ToString(),
        alert.Code,
        alert.Subject,
        lab.FindChannel(new ChannelKey(alert.Source, alert.Subject))?.Name ?? alert.Subject,
        Names.Of(alert.Priority),
        Names.Of(alert.State),
        alert.IsHazard,
        alert.RaisedAt,
        alert.ReturnedAt,
        alert.AcknowledgedAt,
        alert.AcknowledgedBy,
        alert.AcknowledgeNote,
        alert.Headline,
        alert.Detail,
        alert.Value is { } value ? Numbers.OrNull(value) : null,
        alert.Limit is { } limit ? Numbers.OrNull(limit) : null,
        alert.Unit,
        alert.Outlook,
        alert.Shelf is { } shelf ? new AlertShelfView(shelf.By, shelf.At, shelf.Until, shelf.Reason) : null);

    /// <summary>The headline of a message, from its JSON.</summary>
    public static string HeadlineOf(OutboxMessage message)
    {
        using JsonDocument body = JsonDocument.Parse(message.Body);
        return body.RootElement.TryGetProperty("headline", out JsonElement headline) ? headline.GetString() ?? string.Empty : string.Empty;
    }

    /// <summary>One step in an alert's life.</summary>
    public static AlertTransitionView Of(AlertTransition step) =>
        new(step.Sequence, step.At, step.Event, step.By, step.Note, Names.Of(step.Alert.State));

    /// <summary>Alerts as a page lists them: hazards first, then what nobody has acknowledged, then by priority, newest first.</summary>
    public static IReadOnlyList<AlertView> Sorted(LabSnapshot lab, IEnumerable<Alert> alerts) =>
    [
        .. alerts
            .OrderByDescending(alert => alert.IsHazard)
            .ThenBy(alert => alert.Shelf is not null)
            .ThenByDescending(alert => alert.AcknowledgedAt is null)
            .ThenByDescending(alert => alert.Priority)
            .ThenByDescending(alert => alert.RaisedAt)
            .ThenBy(alert => alert.Id)
            .Select(alert => Of(lab, alert)),
    ];
}
