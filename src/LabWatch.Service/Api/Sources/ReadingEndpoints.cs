using LabWatch.Lab.Sources;
using LabWatch.Lab.Time;
using LabWatch.Readings;
using LabWatch.Service.Api.Live;
using LabWatch.Service.Api.Requests;
using LabWatch.Service.Api.Views;
using Microsoft.AspNetCore.Http.HttpResults;
using Microsoft.Net.Http.Headers;

namespace LabWatch.Service.Api.Sources;

/// <summary>Readings of one channel.</summary>
internal static class ReadingEndpoints
{
    /// <summary>Answers with the readings, or with all that is wrong with the request.</summary>
    public static async Task<Results<Ok<ReadingsView>, PushStreamHttpResult, ProblemHttpResult>> ReadAsync(
        string id,
        [AsParameters] ReadingFilter filter,
        HttpRequest http,
        SiteBoard board,
        IReadingStore store,
        TimeProvider clock,
        CancellationToken cancellationToken)
    {
        if (SourceEndpoints.Find(board, id) is not { } source)
        {
            return SourceEndpoints.Missing(id);
        }

        QueryReader query = new(http.Query);
        if (ReadingRequest.Read(query, source, Instant.Now(clock), http.Headers[HeaderNames.Accept]) is not { } request)
        {
            return Refusals.BadRequest(query.Findings);
        }

        ReadingsView view = await ReadingViews.MakeAsync(board.Lab, source, request, store, cancellationToken);
        return request.IsCsv ? Csv(http.HttpContext, source, view) : TypedResults.Ok(view);
    }

    private static PushStreamHttpResult Csv(HttpContext context, ReferenceSource source, ReadingsView view)
    {
        context.Response.Headers.Append(HeaderNames.Vary, HeaderNames.Accept);
        return TypedResults.Stream(stream => ReadingCsv.WriteAsync(stream, view, context.RequestAborted), "text/csv; charset=utf-8", $"{source.Key}.{view.Channel}.csv");
    }
}
