using System.Text.Json.Serialization;

namespace LabWatch.Simulator.Demo;

/// <summary>JSON form of the demo's state. Numbers are written so that they read back exactly.</summary>
[JsonSourceGenerationOptions(PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase, UseStringEnumConverter = true)]
[JsonSerializable(typeof(DemoState))]
internal sealed partial class DemoStateJson : JsonSerializerContext;
