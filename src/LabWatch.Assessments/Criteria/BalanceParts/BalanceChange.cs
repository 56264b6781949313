using LabWatch.Lab.Time;

namespace LabWatch.Assessments.Criteria.BalanceParts;

/// <summary>When a balance changed.</summary>
/// <param name="Likeliest">The likeliest moment.</param>
/// <param name="NotBefore">With 95 % not before; null where it may have been before everything that is looked at.</param>
/// <param name="NotAfter">With 95 % not after.</param>
internal sealed record BalanceChange(Instant Likeliest, Instant? NotBefore, Instant NotAfter);
