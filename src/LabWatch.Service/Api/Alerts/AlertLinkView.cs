using System.ComponentModel;

namespace LabWatch.Service.Api.Alerts;

/// <summary>Where a link of a message leads.</summary>
internal sealed record AlertLinkView([property: Description("Id of the alert.")] Guid Alert);
