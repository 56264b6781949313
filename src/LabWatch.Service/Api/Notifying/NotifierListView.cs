using System.ComponentModel;

namespace LabWatch.Service.Api.Notifying;

/// <summary>The notifiers of the lab file.</summary>
internal sealed record NotifierListView([property: Description("The notifiers.")] IReadOnlyList<NotifierView> Items);
