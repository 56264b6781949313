using System.ComponentModel;

namespace LabWatch.Service.Api.Notifying;

/// <summary>One way of telling somebody.</summary>
internal sealed record NotifierView(
    [property: Description("Id in the lab file.")] string Id,
    [property: Description("log, webhook or mail.")] string Kind,
    [property: Description("Messages that were not taken yet.")] int Waiting,
    [property: Description("What the last attempt of a waiting message failed with; null where nothing.")] string? LastError);
