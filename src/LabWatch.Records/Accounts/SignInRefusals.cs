using LabWatch.Lab.Time;

namespace LabWatch.Records.Accounts;

/// <summary>Refused sign-ins on one account over a while, summed up so that an attack cannot fill the trail.</summary>
/// <param name="Account">The account; null for all names that are no accounts together. Such a name is not kept: it may be a password in the wrong field.</param>
/// <param name="Count">How many, since the entry before.</param>
/// <param name="From">The first of them.</param>
/// <param name="To">The last of them.</param>
/// <param name="Addresses">Some of the addresses that they came from, at most five.</param>
/// <param name="Failures">Refused sign-ins since the last one that succeeded.</param>
public sealed record SignInRefusals(string? Account, int Count, Instant From, Instant To, IReadOnlyList<string> Addresses, int Failures);
