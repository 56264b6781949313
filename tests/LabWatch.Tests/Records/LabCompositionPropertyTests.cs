using System.Text;
using System.Text.Json.Nodes;
using FsCheck.Fluent;
using FsCheck.Xunit;
using LabWatch.Lab;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;
using LabWatch.Records.LabFiles;
using LabWatch.Records.Revisions;
using LabWatch.Tests.Lab;

namespace LabWatch.Tests.Records;

/// <summary>Whatever files follow one another: what is in force reads as the last of them, and nothing of the former ones is lost.</summary>
public sealed class LabCompositionPropertyTests
{
    [Property(MaxTest = 60)]
    public FsCheck.Property What_is_in_force_is_the_last_file_and_every_revision_stays(byte[] choices) =>
        Holds(choices is null ? [] : choices.Take(6).ToArray()).ToProperty();

    private static bool Holds(byte[] choices)
    {
        LabRecordSet records = new("sample", [], null);
        int revision = 1;
        for (int i = 0; i < choices.Length; i++)
        {
            byte[] file = File(choices[i], ref revision);
            string digest = LabImportLedger.DigestOf(file);
            Instant at = Instant.FromUnixSeconds(1_796_000_000 + (60L * i));
            LabImportPlan plan = LabImportPlanner.Plan(records, new LabImportOrder(file, "lab.json", "os/kim", at) { Accept = true }, digest);
            IReadOnlyList<RecordRevision> before = records.Revisions;
            records = records with { Revisions = [.. before, .. plan.Revisions], LatestImport = new LabImport("sample", i + 1, digest, string.Empty, at, "os/kim") };
            if (plan.Findings.Count > 0 || !records.Revisions.Take(before.Count).SequenceEqual(before) || !IsLike(file, records))
            {
                return false;
            }
        }

        return true;
    }

    private static bool IsLike(byte[] file, LabRecordSet records)
    {
        LabSnapshot expected = LabFileReader.Read(file).Snapshot!;
        LabSnapshot actual = LabFileReader.Read(records.Compose()!).Snapshot!;
        HashSet<string> named = [.. expected.Sources.Select(source => source.Key.Source)];
        bool sources = named.SetEquals(actual.Sources.Select(source => source.Key.Source))
            && expected.Sources.All(source => actual.FindSource(source.Key)!.Name == source.Name);
        bool notifiers = expected.Notifiers.ToHashSet().SetEquals(actual.Notifiers);
        bool limits = expected.Limits.All(limit => actual.Limits.Contains(limit))
            && actual.Limits.Where(limit => limit.WithdrawnFrom is null).All(limit => expected.Limits.Any(known => known.Id == limit.Id));
        bool sequence = records.Revisions.Select(revision => revision.Sequence).SequenceEqual(Enumerable.Range(1, records.Revisions.Count).Select(number => (long)number));
        return sources && notifiers && limits && sequence;
    }

    // Each bit makes another difference to the sample: names, a second source, no notifier, the limit's next revision.
    private static byte[] File(byte choice, ref int revision)
    {
        JsonObject document = LabDocument.Parse(Encoding.UTF8.GetBytes(LabFileSample.Text));
        document["sources"]![0]!["name"] = $"Fir {choice & 3}";
        if ((choice & 4) != 0)
        {
            JsonNode oak = document["sources"]![0]!.DeepClone();
            oak["id"] = "oak";
            document["sources"]!.AsArray().Add(oak);
        }

        if ((choice & 8) != 0)
        {
            document.Remove("notifiers");
        }

        if ((choice & 16) != 0)
        {
            revision++;
            document["limits"]![0]!["maximum"] = 20 + revision;
        }
        else if (revision > 1)
        {
            document["limits"]![0]!["maximum"] = 20 + revision;
        }

        document["limits"]![0]!["revision"] = revision;
        return Encoding.UTF8.GetBytes(document.ToJsonString());
    }
}
