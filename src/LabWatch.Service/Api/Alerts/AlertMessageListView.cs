using System.ComponentModel;

namespace LabWatch.Service.Api.Alerts;

/// <summary>The messages about an alert.</summary>
internal sealed record AlertMessageListView([property: Description("The messages, oldest first.")] IReadOnlyList<AlertMessageView> Items);
