using LabWatch.Assessments.Criteria;
using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.HttpResults;

namespace LabWatch.Service.Api.Sources;

/// <summary>Learns a balance from stored readings. Nothing is changed: what is learnt is put on record by whoever has looked at it.</summary>
internal static class BalanceEndpoint
{
    private static readonly TimeSpan Shortest = TimeSpan.FromDays(1);
    private static readonly TimeSpan Longest = TimeSpan.FromDays(31);
    private const long BlockMicroseconds = 600 * Instant.MicrosecondsPerSecond;

    /// <summary>Answers with the balance.</summary>
    public static async Task<Results<Ok<BalanceView>, ProblemHttpResult>> LearnAsync(
        string id, [AsParameters] BalanceFilter filter, HttpRequest http, SiteBoard board, IReadingStore store, CancellationToken cancellationToken)
    {
        if (SourceEndpoints.Find(board, id) is not { } known)
        {
            return SourceEndpoints.Missing(id);
        }

        QueryReader query = new(http.Query);
        query.Allow("channel", "from", "until");
        TimeWindow? span = SpanOf(query);
        ReferenceSource source = span is { } asked ? board.Lab.SourceInForce(known.Key, asked.End) ?? known : known;
        Channel? channel = query.Text("channel") is { } name ? source.FindChannel(name) : null;
        BalanceLearning? learning = channel is null ? null : new(board.Lab, source, channel);
        if (learning is not { Channels.Count: > 0 })
        {
            query.Add("no-balance", "channel", "This channel has no balance.", query.Text("channel"),
                "Give the heater power or a well thermometer that is not the reference, of a source with a reference and an air temperature.");
        }

        if (query.Findings.Count > 0)
        {
            return Refusals.BadRequest(query.Findings);
        }

        for (Instant from = span!.Value.Start; from < span.Value.End; from += Shortest)
        {
            TimeWindow part = new(from, from + Shortest < span.Value.End ? from + Shortest : span.Value.End);
            learning!.Add(part, await store.ReadAsync(source.Key, learning.Channels, part, cancellationToken));
        }

        return learning!.Learn() is { } balance
            ? TypedResults.Ok(View(balance))
            : Refusals.Refuse(StatusCodes.Status400BadRequest, "Nothing can be learnt from this span.", [new(
                "too-few", "?from", "Too few ten-minute means count: at one set point and shutter for half an hour, with every channel that the balance needs.", null, "Give a longer span in which the source worked at its set points.")]);
    }

    private static TimeWindow? SpanOf(QueryReader query)
    {
        Instant? from = query.Time("from"), until = query.Time("until");
        if (from is not { } start || until is not { } end)
        {
            query.Add("missing", from is null ? "from" : "until", "The span is missing.", null, "Give from and until, 1 to 31 days in which the source was in order.");
            return null;
        }

        TimeWindow span = new(start.Floor(BlockMicroseconds), end.Floor(BlockMicroseconds));
        if (span.End - span.Start < Shortest || span.End - span.Start > Longest)
        {
            query.Add("out-of-range", "until", "The span is shorter than a day or longer than 31 days.", null, "Give 1 to 31 days in which the source was in order.");
            return null;
        }

        return span;
    }

    private static BalanceView View(LearntBalance balance) => new(
        balance.Channel,
        [.. balance.Terms.Select(term => new BalanceTermView(Names.Of(term.Kind), term.Coefficient))],
        balance.ResidualDeviation,
        balance.Correlation,
        balance.Blocks,
        new(balance.Range.Minimum, balance.Range.Maximum),
        balance.LearntFrom,
        balance.LearntUntil,
        balance.ReadingsDigest);
}
