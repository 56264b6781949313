using System.Buffers.Binary;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using System.Security.Cryptography;
using System.Text;

namespace LabWatch.Records.Audit.Verification;

/// <summary>The entries of all chains as read, and which record each of them covers.</summary>
internal sealed class TrailFacts
{
    private readonly List<EntryFacts> _entries = [];
    private readonly Dictionary<UInt128, int> _bySubject = [];
    private readonly List<string> _sites = [];
    private byte[] _lastSite = [];
    private int _lastSiteNumber = -1;

    /// <summary>The entries, in the order of reading until the chain check sorts them.</summary>
    public Span<EntryFacts> Entries => CollectionsMarshal.AsSpan(_entries);

    /// <summary>What the digest of an entry should be, for those that have another one, by place.</summary>
    public Dictionary<int, Vector256<byte>> Computed { get; } = [];

    /// <summary>Ids of the sites met.</summary>
    public IReadOnlyList<string> Sites => _sites;

    /// <summary>Number of a site in <see cref="Sites"/>.</summary>
    public int SiteNumber(ReadOnlySpan<byte> site)
    {
        if (_lastSiteNumber >= 0 && site.SequenceEqual(_lastSite))
        {
            return _lastSiteNumber;
        }

        _lastSite = site.ToArray();
        string name = Encoding.UTF8.GetString(site);
        _lastSiteNumber = _sites.IndexOf(name);
        if (_lastSiteNumber < 0)
        {
            _lastSiteNumber = _sites.Count;
            _sites.Add(name);
        }

        return _lastSiteNumber;
    }

    /// <summary>Adds an entry. Of several entries about one record the one with the highest number counts.</summary>
    public void Add(in EntryFacts entry, ReadOnlySpan<byte> subject)
    {
        int place = _entries.Count;
        _entries.Add(entry);
        if (!entry.HasRecord)
        {
            return;
        }

        ref int known = ref CollectionsMarshal.GetValueRefOrAddDefault(_bySubject, KeyOf(entry.Site, subject), out bool exists);
        if (!exists || Entries[known].Sequence < entry.Sequence)
        {
            if (exists)
            {
                Entries[known].IsClaimed = true;
            }

            known = place;
        }
        else
        {
            Entries[place].IsClaimed = true;
        }
    }

    /// <summary>Place of the entry that covers a record; -1 where none does.</summary>
    public int Find(ReadOnlySpan<byte> site, ReadOnlySpan<byte> subject) => _bySubject.GetValueOrDefault(KeyOf(SiteNumber(site), subject), -1);

    /// <summary>Half of a digest of the subject: short in memory, and no two subjects can be made that share it.</summary>
    private static UInt128 KeyOf(int site, ReadOnlySpan<byte> subject)
    {
        Span<byte> digest = stackalloc byte[SHA256.HashSizeInBytes];
        SHA256.HashData(subject, digest);
        return BinaryPrimitives.ReadUInt128LittleEndian(digest) ^ (UInt128)(uint)site;
    }
}
