using System.Text.Json.Serialization;

namespace LabWatch.Alerts.Push;

/// <summary>JSON of subscriptions and push messages.</summary>
[JsonSourceGenerationOptions(PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase)]
[JsonSerializable(typeof(IReadOnlyList<PushSubscription>))]
[JsonSerializable(typeof(PushContent))]
internal sealed partial class PushJson : JsonSerializerContext;
