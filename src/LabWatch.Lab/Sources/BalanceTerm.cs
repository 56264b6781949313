namespace LabWatch.Lab.Sources;

/// <summary>One term of a <see cref="LearntBalance"/>.</summary>
/// <param name="Kind">What it is proportional to.</param>
/// <param name="Coefficient">Coefficient, in the unit of the balance over that of the kind.</param>
public readonly record struct BalanceTerm(BalanceTermKind Kind, double Coefficient);
