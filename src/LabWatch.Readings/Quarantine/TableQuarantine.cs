using System.Data.Common;
using System.Security.Cryptography;
using System.Text;
using System.Text.Json;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;

namespace LabWatch.Readings.Quarantine;

/// <summary>
/// Refused messages in a table. The newest are kept, within a bound on count and bytes; repeats and dropped ones are counted. Opens on
/// first use; safe for many callers.
/// </summary>
public class TableQuarantine : IQuarantine, IDisposable
{
    /// <summary>Longest payload that is kept whole, in bytes; longer ones are cut.</summary>
    public const int MaximumPayloadBytes = 64 * 1024;

    private const int MaximumTopicLength = 1024;
    private const int MaximumFindings = 32;

    private readonly IQuarantineTable _table;
    private readonly SemaphoreSlim _one = new(1, 1);

    internal TableQuarantine(IQuarantineTable table) => _table = table;

    /// <inheritdoc/>
    public async ValueTask AddAsync(IReadOnlyList<QuarantinedMessage> messages, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(messages);
        if (messages.Count > 0)
        {
            await UseAsync(() => _table.Add(messages.Select(Row)), cancellationToken);
        }
    }

    /// <inheritdoc/>
    public async ValueTask<IReadOnlyList<QuarantinedMessage>> NewestAsync(int count, CancellationToken cancellationToken)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(count);
        return await UseAsync(() => (IReadOnlyList<QuarantinedMessage>)[.. _table.Newest(count).Select(Message)], cancellationToken);
    }

    /// <inheritdoc/>
    public async ValueTask<long> TotalAsync(CancellationToken cancellationToken) => await UseAsync(_table.Refused, cancellationToken);

    /// <inheritdoc/>
    public void Dispose()
    {
        Dispose(true);
        GC.SuppressFinalize(this);
    }

    /// <summary>Closes the table.</summary>
    protected virtual void Dispose(bool disposing)
    {
        _table.Dispose();
        _one.Dispose();
    }

    private static QuarantineRow Row(QuarantinedMessage message)
    {
        string topic = Cut(message.Topic);
        byte[] payload = message.Payload.Span[..Math.Min(message.Payload.Length, MaximumPayloadBytes)].ToArray();
        string findings = JsonSerializer.Serialize(message.Findings.Take(MaximumFindings));
        return new QuarantineRow(message.Arrival.Microseconds, topic, payload, findings, Fingerprint(topic, message));
    }

    private static QuarantinedMessage Message(QuarantineRow row) => new(
        new Instant(row.Arrival), row.Topic, row.Payload, JsonSerializer.Deserialize<Finding[]>(row.Findings) ?? []);

    private static string Cut(string topic) => topic.Length <= MaximumTopicLength ? topic : topic[..MaximumTopicLength];

    private static byte[] Fingerprint(string topic, QuarantinedMessage message)
    {
        using IncrementalHash hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        string codes = string.Join(',', message.Findings.Select(one => one.Code));
        hash.AppendData(SHA256.HashData(Encoding.UTF8.GetBytes(topic)));
        hash.AppendData(SHA256.HashData(Encoding.UTF8.GetBytes(codes)));
        hash.AppendData(message.Payload.Span);
        return hash.GetHashAndReset();
    }

    private Task<int> UseAsync(Action action, CancellationToken cancellationToken) => UseAsync(
        () =>
        {
            action();
            return 0;
        },
        cancellationToken);

    private async Task<T> UseAsync<T>(Func<T> action, CancellationToken cancellationToken)
    {
        await _one.WaitAsync(cancellationToken);
        try
        {
            return await Task.Run(action, CancellationToken.None);
        }
        catch (Exception error) when (error is DbException or IOException or UnauthorizedAccessException or TimeoutException)
        {
            _table.Close();
            throw error as StoreUnavailableException ?? new StoreUnavailableException($"The quarantine cannot be used: {error.Message}", error);
        }
        finally
        {
            _one.Release();
        }
    }
}
