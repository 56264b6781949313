using System.Text.Json.Serialization;
using LabWatch.Lab.Time;

namespace LabWatch.Alerts.Hazards;

/// <summary>JSON of the times at which channels were last heard.</summary>
[JsonSerializable(typeof(Dictionary<string, Instant>))]
internal sealed partial class HeardJson : JsonSerializerContext;
