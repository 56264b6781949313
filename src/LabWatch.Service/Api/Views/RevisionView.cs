using System.ComponentModel;
using System.Text.Json.Nodes;
using LabWatch.Lab.Time;

namespace LabWatch.Service.Api.Views;

/// <summary>One revision of a record of what is configured.</summary>
internal sealed record RevisionView(
    [property: Description("limit, certificate, instrument or installation.")] string Kind,
    [property: Description("Id of the record.")] string Id,
    [property: Description("Number of the revision.")] int Revision,
    [property: Description("How assessments name it: id@revision.")] string Reference,
    [property: Description("Whether it is the one in force now.")] bool InForce,
    [property: Description("First instant at which it holds.")] Instant EffectiveFrom,
    [property: Description("Whether it takes the record out of force.")] bool Withdrawn,
    [property: Description("Who made it: an account, labwatch for the service itself, os/NAME for whoever ran the program.")] string Author,
    [property: Description("Why.")] string Reason,
    [property: Description("When it was recorded.")] Instant RecordedAt,
    [property: Description("Number of the import of a lab file that brought it; null for an edit.")] int? Import,
    [property: Description("SHA-256 of the content's canonical form (RFC 8785), hexadecimal.")] string Digest,
    [property: Description("The entry in the lab file's own form; null for a withdrawal.")] JsonObject? Content);
