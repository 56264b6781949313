using System.ComponentModel;
using LabWatch.Lab.Findings;

namespace LabWatch.Service.Api.Alerts;

/// <summary>Somebody has seen an alert and takes it on.</summary>
internal sealed record AcknowledgeRequest(
    [property: Description("What that person saw or did, at most 1,000 characters; may be missing.")] string? Note)
{
    private const int MaximumNote = 1_000;

    /// <summary>What is wrong with it.</summary>
    public IReadOnlyList<Finding> Check()
    {
        List<Finding> findings = [];
        if (Note is not null && (Note.Length > MaximumNote || Note.Any(c => char.IsControl(c) && c is not ('\n' or '\r' or '\t'))))
        {
            findings.Add(new Finding("not-a-note", "/note", "The note is too long or has control characters.", Finding.Quote(Note), "Give at most 1000 characters of text."));
        }

        return findings;
    }
}
