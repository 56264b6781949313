namespace LabWatch.Service.Api.Access;

/// <summary>Finds out who makes a request.</summary>
internal interface ICallers
{
    /// <summary>The caller by the session or token that the request carries; null for a stranger.</summary>
    ValueTask<Caller?> FindAsync(HttpContext http);
}
