using System.Runtime.Intrinsics;

namespace LabWatch.Records.Audit.Verification;

/// <summary>What stays in memory of an entry: enough to check the chain in any order, and the rows against it.</summary>
internal struct EntryFacts
{
    /// <summary>Place of the site in the list of sites.</summary>
    public int Site;

    public long Sequence;

    public Vector256<byte> Digest;

    public Vector256<byte> Previous;

    /// <summary>Digest of the covered record; meaningless where <see cref="HasRecord"/> is false.</summary>
    public Vector256<byte> Record;

    public bool HasRecord;

    /// <summary>Whether a row was found that the entry covers.</summary>
    public bool IsClaimed;

    /// <summary>Whether the digest is not that of the content; <see cref="TrailFacts.Computed"/> has the right one.</summary>
    public bool IsAltered;

    /// <summary>Whether a finding tells of the entry already.</summary>
    public bool IsReported;
}
