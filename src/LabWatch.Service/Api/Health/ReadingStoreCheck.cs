using System.Globalization;
using LabWatch.Lab;
using LabWatch.Readings;

namespace LabWatch.Service.Api.Health;

/// <summary>Asks whether the store of readings takes readings, reads from it, and tells what was found damaged.</summary>
internal sealed class ReadingStoreCheck(IReadingStore store, IReadingStoreHealth health, ILabSnapshotSource lab) : IDependencyCheck
{
    /// <inheritdoc/>
    public string Part => "reading-store";

    /// <inheritdoc/>
    public async ValueTask<DependencyAnswer> AskAsync(CancellationToken cancellationToken)
    {
        if (health.Trouble is { } trouble)
        {
            return new DependencyAnswer(false, "It takes no readings now: " + trouble);
        }

        string damage = health.Findings is { Count: > 0 } findings
            ? string.Create(CultureInfo.InvariantCulture, $" Damage was found and set aside {findings.Count} times; the newest: {findings[^1].Code}, {findings[^1].Message}")
            : string.Empty;
        if (lab.Current.Sources.Count == 0)
        {
            return new DependencyAnswer(true, "There is no source to ask for." + damage);
        }

        int channels = (await store.NewestAsync(lab.Current.Sources[0].Key, cancellationToken).ConfigureAwait(false)).Count;
        return new DependencyAnswer(true, string.Create(CultureInfo.InvariantCulture, $"It answers; the first source has {channels} channels with readings.{damage}"));
    }
}
