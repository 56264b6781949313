using LabWatch.Lab.Findings;
using LabWatch.Records.Revisions;

namespace LabWatch.Service.Hosting;

/// <summary>Takes what is on record into force.</summary>
internal interface ILabInForce
{
    /// <summary>
    /// Puts the records in force at once, and keeps them for a start without a database. Older records than those in force change nothing.
    /// </summary>
    /// <returns>Why they cannot be in force, where this program finds them wrong; empty where they are.</returns>
    IReadOnlyList<Finding> Adopt(LabRecordSet records);
}
