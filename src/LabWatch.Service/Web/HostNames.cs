namespace LabWatch.Service.Web;

/// <summary>Names by which the service may be called.</summary>
/// <param name="Allowed">The names; empty for every name.</param>
internal sealed record HostNames(IReadOnlyList<string> Allowed);
