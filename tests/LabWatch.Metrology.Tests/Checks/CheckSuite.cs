namespace LabWatch.Metrology.Tests.Checks;

/// <summary>Checks on one subject. The tests run each; the validation page lists each.</summary>
public abstract class CheckSuite
{
    private readonly Lazy<IReadOnlyList<Check>> _checks;

    protected CheckSuite() => _checks = new(() => [.. Build()]);

    /// <summary>Heading on the validation page.</summary>
    public abstract string Title { get; }

    /// <summary>A sentence below the heading: what is compared with what.</summary>
    public abstract string Introduction { get; }

    /// <summary>The checks, ids unique.</summary>
    public IReadOnlyList<Check> Checks => _checks.Value;

    /// <summary>Rows of the source that no check is made of, each with the reason.</summary>
    public virtual IReadOnlyList<(string Rows, string Reason)> NotApplicable => [];

    /// <summary>Makes the checks.</summary>
    protected abstract IEnumerable<Check> Build();
}
