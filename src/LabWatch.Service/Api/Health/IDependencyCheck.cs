namespace LabWatch.Service.Api.Health;

/// <summary>Asks one part that the service depends on, by using it.</summary>
internal interface IDependencyCheck
{
    /// <summary>Name of the part.</summary>
    string Part { get; }

    /// <summary>Whether it answered as it should, and what was found. May throw: a throw is a no.</summary>
    ValueTask<DependencyAnswer> AskAsync(CancellationToken cancellationToken);
}
