using LabWatch.Lab.Alerts;
using LabWatch.Records;
using LabWatch.Records.Alerts;

namespace LabWatch.Service.Api.Alerts;

/// <summary>
/// One page of the open alerts from the board in memory, newest raised first: what stands now must be seen when no database answers.
/// </summary>
internal static class OpenAlertPage
{
    /// <summary>The page that a query asks for.</summary>
    /// <param name="open">All open alerts.</param>
    /// <param name="query">The query; its cursor, if any, is of a page that this made.</param>
    public static AlertPage Of(IReadOnlyList<Alert> open, AlertQuery query)
    {
        PageCursor? after = PageCursor.TryParse(query.After, out PageCursor cursor) ? cursor : null;
        List<(Alert Alert, PageCursor Place)> rows = [.. Placed(open.Where(alert => query.Source is not { } source || alert.Source == source))
            .Where(row => after is not { } last || row.Place.Time < last.Time || (row.Place.Time == last.Time && row.Place.Number > last.Number))
            .Take(query.Count + 1)];
        bool hasMore = rows.Count > query.Count;
        return new AlertPage([.. rows.Take(query.Count).Select(row => row.Alert)], hasMore ? rows[query.Count - 1].Place.ToString() : null);
    }

    // Alerts raised in the same microsecond are told apart by their place in the order of their ids.
    private static IEnumerable<(Alert Alert, PageCursor Place)> Placed(IEnumerable<Alert> open) => open
        .GroupBy(alert => alert.RaisedAt)
        .OrderByDescending(group => group.Key)
        .SelectMany(group => group.OrderByDescending(alert => alert.Id).Select((alert, place) => (alert, new PageCursor(group.Key.Microseconds, place))));
}
