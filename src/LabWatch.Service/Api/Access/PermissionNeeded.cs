namespace LabWatch.Service.Api.Access;

/// <summary>On an endpoint: the permission that its caller needs.</summary>
internal sealed record PermissionNeeded(Permission Permission);
