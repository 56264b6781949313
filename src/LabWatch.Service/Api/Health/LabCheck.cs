using System.Globalization;
using LabWatch.Service.Hosting;

namespace LabWatch.Service.Api.Health;

/// <summary>Whether the lab file given at the start is on record.</summary>
internal sealed class LabCheck(LabKeeper keeper, LabSnapshotSource lab) : IDependencyCheck
{
    /// <inheritdoc/>
    public string Part => "lab";

    /// <inheritdoc/>
    public ValueTask<DependencyAnswer> AskAsync(CancellationToken cancellationToken) => ValueTask.FromResult(
        keeper.Refused.Count > 0
            ? new DependencyAnswer(false, "The lab file given at the start is not in force: " + keeper.Refused[0])
            : lab.Sequence == 0
                ? new DependencyAnswer(false, "The lab file in force is not on record yet.")
                : new DependencyAnswer(true, string.Create(CultureInfo.InvariantCulture, $"On record; revision number {lab.Sequence} is in force.")));
}
