using System.ComponentModel;

namespace LabWatch.Service.Api.Alerts;

/// <summary>Somebody shelves an alert, or takes it out of service.</summary>
internal sealed record ShelveRequest(
    [property: Description("Why, 1 to 1000 characters.")] string? Reason,
    [property: Description("For how many minutes, 1 to 1440 where nothing else is configured; passed over for out of service.")] int? Minutes);
