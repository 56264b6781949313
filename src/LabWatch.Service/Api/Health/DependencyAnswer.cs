namespace LabWatch.Service.Api.Health;

/// <summary>What a part answered.</summary>
/// <param name="IsReady">Whether as it should.</param>
/// <param name="Detail">What was found, in words.</param>
internal sealed record DependencyAnswer(bool IsReady, string Detail);
