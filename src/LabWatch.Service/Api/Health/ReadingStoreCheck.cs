using System.Globalization;
using LabWatch.Lab;
using LabWatch.Readings;

namespace LabWatch.Service.Api.Health;

/// <summary>Reads from the reading store.</summary>
internal sealed class ReadingStoreCheck(IReadingStore store, ILabSnapshotSource lab) : IDependencyCheck
{
    /// <inheritdoc/>
    public string Part => "reading-store";

    /// <inheritdoc/>
    public async ValueTask<DependencyAnswer> AskAsync(CancellationToken cancellationToken)
    {
        if (lab.Current.Sources.Count == 0)
        {
            return new DependencyAnswer(true, "There is no source to ask for.");
        }

        int channels = (await store.NewestAsync(lab.Current.Sources[0].Key, cancellationToken).ConfigureAwait(false)).Count;
        return new DependencyAnswer(true, string.Create(CultureInfo.InvariantCulture, $"It answers; the first source has {channels} channels with readings."));
    }
}
