using System.Text.Json.Serialization;

namespace LabWatch.Records.Storage;

/// <summary>Serialisers of the JSON columns.</summary>
[JsonSourceGenerationOptions(
    PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase,
    NumberHandling = JsonNumberHandling.AllowNamedFloatingPointLiterals)]
[JsonSerializable(typeof(StoredFigure[]))]
[JsonSerializable(typeof(StoredProvenance))]
internal sealed partial class StoredDocumentsContext : JsonSerializerContext;
