using System.Text.Json;
using LabWatch.Lab.Assessments;
using LabWatch.Metrology.Uncertainty;

namespace LabWatch.Records.Storage;

/// <summary>
/// The JSON columns of an assessment. The form belongs to the stored format: members are added, never renamed. Not a number is null;
/// an infinite number of degrees of freedom is the text <c>Infinity</c>.
/// </summary>
internal static class StoredDocuments
{
    public static string Write(IReadOnlyList<AssessmentFigure> figures) =>
        JsonSerializer.Serialize(
            [.. figures.Select(figure => new StoredFigure(
                figure.Name,
                NotANumberToNull(figure.Value.Value),
                NotANumberToNull(figure.Value.StandardUncertainty),
                NotANumberToNull(figure.Value.DegreesOfFreedom),
                figure.Unit))],
            StoredDocumentsContext.Default.StoredFigureArray);

    public static string Write(Provenance provenance) =>
        JsonSerializer.Serialize(
            new StoredProvenance(
                provenance.ReadingsDigest,
                [.. provenance.Hours.Select(hour => new StoredHour(hour.Hour, hour.Revision))],
                [.. provenance.Certificates],
                provenance.Limit,
                provenance.ProgramVersion,
                provenance.Source),
            StoredDocumentsContext.Default.StoredProvenance);

    public static IReadOnlyList<AssessmentFigure> ReadFigures(string json) =>
        [.. JsonSerializer.Deserialize(json, StoredDocumentsContext.Default.StoredFigureArray)!.Select(figure => new AssessmentFigure(
            figure.Name,
            new Estimate(figure.Value ?? double.NaN, figure.StandardUncertainty ?? double.NaN, figure.DegreesOfFreedom ?? double.NaN),
            figure.Unit))];

    public static Provenance ReadProvenance(string json)
    {
        StoredProvenance stored = JsonSerializer.Deserialize(json, StoredDocumentsContext.Default.StoredProvenance)!;
        return new Provenance(
            stored.ReadingsDigest,
            [.. stored.Hours.Select(hour => new SourceHourRead(hour.Hour, hour.Revision))],
            stored.Certificates,
            stored.Limit,
            stored.ProgramVersion)
        {
            Source = stored.Source,
        };
    }

    public static double? NotANumberToNull(double value) => double.IsNaN(value) ? null : value;
}
