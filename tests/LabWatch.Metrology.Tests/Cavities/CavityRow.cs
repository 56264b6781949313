using System.Globalization;
using LabWatch.Metrology.Cavities;
using LabWatch.Metrology.Tests.Checks;

namespace LabWatch.Metrology.Tests.Cavities;

/// <summary>A row of a file of effective emissivities; lengths in units of the radius.</summary>
internal sealed class CavityRow(IReadOnlyDictionary<string, string> fields)
{
    public string Id => fields["row_id"];

    public CavityGeometry Geometry { get; } = new(
        fields["shape"] switch
        {
            "sphere" => CavityForm.Sphere,
            "cylinder-flat" => CavityForm.Cylinder,
            "cylinder-cone-out" => CavityForm.CylinderOutwardCone,
            "cylinder-cone-re" => CavityForm.CylinderInwardCone,
            _ => throw new FormatException(fields["shape"]),
        },
        Number(fields["R"]),
        Number(fields["Lc"]),
        Number(fields["cone_half_deg"]),
        Number(fields["r"]));

    public CavityView View { get; } = fields["view"] switch
    {
        "axis" => CavityView.Axis,
        "beam" => CavityView.Beam(Number(fields["rb"])),
        "cone" => CavityView.Cone(Number(fields["d"]), Number(fields["rs"])),
        "wall" => CavityView.Wall(Number(fields["wall_z"])),
        _ => CavityView.Hemispherical,
    };

    public double Emissivity => Number(fields["eps"]);

    public double DiffuseFraction => Number(fields["D"]);

    public string Method => fields["method"];

    public string Text(string column) => fields[column];

    public double Value(string column) => Number(fields[column]);

    public string What
    {
        get
        {
            string cone = fields["cone_half_deg"].Length > 0 ? $" half-angle {fields["cone_half_deg"]} deg," : "";
            string length = fields["Lc"].Length > 0 ? $" L/R = {fields["Lc"]}," : "";
            return $"{fields["shape"]},{length}{cone} r/R = {fields["r"]}, e = {fields["eps"]}, D = {fields["D"]}, {ViewText}";
        }
    }

    public static IEnumerable<CavityRow> Read(string file) => CsvFile.Read(file).Select(fields => new CavityRow(fields));

    private string ViewText => View.Kind switch
    {
        CavityViewKind.Beam => $"beam {fields["rb"]}",
        CavityViewKind.Cone => $"cone d = {fields["d"]} spot {fields["rs"]}",
        CavityViewKind.Wall => $"wall at z = {fields["wall_z"]}",
        _ => fields["view"],
    };

    private static double Number(string text) => text.Length == 0 ? 0 : double.Parse(text, CultureInfo.InvariantCulture);
}
