using System.Text.Json.Serialization;

namespace LabWatch.Alerts.Outbox;

/// <summary>JSON of the messages.</summary>
[JsonSourceGenerationOptions(PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase)]
[JsonSerializable(typeof(MessageBody))]
internal sealed partial class MessageJson : JsonSerializerContext;
