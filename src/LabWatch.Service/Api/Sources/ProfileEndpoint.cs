using LabWatch.Assessments.Cavities;
using LabWatch.Assessments.Profiles;
using LabWatch.Lab.Readings;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Sources;

/// <summary>The live profile of a source, or the one it had.</summary>
internal static class ProfileEndpoint
{
    /// <summary>How far back a reading is looked for where an instant is asked for: longer than any channel may be silent and count.</summary>
    private static readonly TimeSpan LookBack = TimeSpan.FromMinutes(10);

    /// <summary>Answers with the profile now, or at an instant.</summary>
    public static async Task<Results<Ok<ProfileView>, ProblemHttpResult>> ReadAsync(
        string id,
        [AsParameters] ProfileFilter filter,
        HttpRequest http,
        SiteBoard board,
        LiveReadings live,
        IReadingStore store,
        ICavityModels models,
        TimeProvider clock,
        CancellationToken cancellationToken)
    {
        if (SourceEndpoints.Find(board, id) is not { } source)
        {
            return SourceEndpoints.Missing(id);
        }

        QueryReader query = new(http.Query);
        query.Allow("at");
        Instant? asked = query.Time("at");
        if (query.Findings.Count > 0)
        {
            return Refusals.BadRequest(query.Findings);
        }

        Instant at = asked ?? Instant.Now(clock);
        source = asked is null ? source : board.Lab.SourceInForce(source.Key, at) ?? source;
        IReadOnlyDictionary<string, Reading> newest = asked is null
            ? await live.NewestAsync(source.Key, cancellationToken)
            : await NewestAtAsync(store, source, at, cancellationToken);
        Reading[] counting = [.. newest.Values.Where(reading => source.FindChannel(reading.Channel) is { } channel && !Silence.IsSilent(channel, reading.Time, at))];

        // The first call for a cavity may have to trace it; that is no work for the thread of a request.
        SourceProfile profile = await Task.Run(() => SourceProfile.Of(board.Lab, source, counting, at, models), cancellationToken);
        return TypedResults.Ok(ProfileViews.Of(board.Lab, profile, newest, at));
    }

    private static async ValueTask<IReadOnlyDictionary<string, Reading>> NewestAtAsync(
        IReadingStore store, ReferenceSource source, Instant at, CancellationToken cancellationToken)
    {
        ReadingWindow window = await store.ReadAsync(source.Key, null, new TimeWindow(at - LookBack, new Instant(at.Microseconds + 1)), cancellationToken);
        return window.Series.Where(series => series.Count > 0).ToDictionary(
            series => series.Channel,
            series => new Reading(series.Channel, new Instant(series.TimeMicroseconds.Span[^1]), series.Values.Span[^1], series.Qualities.Span[^1]),
            StringComparer.Ordinal);
    }
}
