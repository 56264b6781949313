using System.Collections.Immutable;
using System.Text.Json;
using Microsoft.AspNetCore.Http.Json;
using Microsoft.Extensions.Options;

namespace LabWatch.Service.Api.Streaming;

/// <summary>Hands changes to everybody who listens.</summary>
internal sealed class StreamHub(IOptions<JsonOptions> json, StreamMetrics metrics)
{
    /// <summary>Listeners at most: beyond, a page is asked to come back later.</summary>
    public const int MaximumClients = 500;

    private readonly Lock _gate = new();
    private ImmutableArray<StreamClient> _clients = [];
    private long _lastId;
    private bool _isEnded;

    /// <summary>Whether anybody listens.</summary>
    public bool HasClients => !_clients.IsEmpty;

    /// <summary>Number of the latest event.</summary>
    public long LastId => Interlocked.Read(ref _lastId);

    /// <summary>Adds a listener; null where there are too many, or the service stops.</summary>
    public StreamClient? Join()
    {
        lock (_gate)
        {
            if (_isEnded || _clients.Length >= MaximumClients)
            {
                return null;
            }

            StreamClient client = new();
            _clients = _clients.Add(client);
            metrics.Clients(1);
            return client;
        }
    }

    /// <summary>Removes a listener.</summary>
    public void Leave(StreamClient client)
    {
        lock (_gate)
        {
            ImmutableArray<StreamClient> left = _clients.Remove(client);
            if (left.Length != _clients.Length)
            {
                metrics.Clients(-1);
            }

            _clients = left;
        }
    }

    /// <summary>The JSON of a value as the whole API writes it.</summary>
    public byte[] Write<T>(T value) => JsonSerializer.SerializeToUtf8Bytes(value, json.Value.SerializerOptions);

    /// <summary>Hands an event to everybody. Never waits.</summary>
    public void Publish(string name, ReadOnlyMemory<byte> data)
    {
        lock (_gate)
        {
            StreamMessage message = new(Interlocked.Increment(ref _lastId), name, data);
            foreach (StreamClient client in _clients)
            {
                if (!client.Offer(message))
                {
                    metrics.WasCut();
                }
            }
        }
    }

    /// <summary>Ends every stream, so that the service can stop without waiting for browsers.</summary>
    public void End()
    {
        lock (_gate)
        {
            _isEnded = true;
            foreach (StreamClient client in _clients)
            {
                client.End();
            }
        }
    }
}
