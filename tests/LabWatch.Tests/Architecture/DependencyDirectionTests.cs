using System.Xml.Linq;

namespace LabWatch.Tests.Architecture;

/// <summary>The house has one way in and one way out: which room may use which, transitively.</summary>
public sealed class DependencyDirectionTests
{
    private static readonly Dictionary<string, string[]> MayUse = new(StringComparer.Ordinal)
    {
        ["Metrology"] = [],
        ["Lab"] = ["Metrology"],
        ["Readings"] = ["Lab"],
        ["Intake"] = ["Readings"],
        ["Records"] = ["Lab"],
        ["Assessments"] = ["Readings", "Records", "Metrology"],
        ["Alerts"] = ["Records", "Metrology"],
        ["Evidence"] = ["Assessments", "Alerts"],
        ["Simulator"] = ["Lab"],
        ["Service"] = ["Metrology", "Lab", "Readings", "Intake", "Records", "Assessments", "Alerts", "Evidence", "Simulator"],
    };

    public static TheoryData<string> Rooms => [.. MayUse.Keys];

    [Fact]
    public void Every_project_under_src_is_a_room_of_the_house()
    {
        IEnumerable<string> found = Directory.GetDirectories(RepositoryFiles.PathOf("src")).Select(path => Path.GetFileName(path)["LabWatch.".Length..]);
        Assert.Equal(MayUse.Keys.Order(StringComparer.Ordinal), found.Order(StringComparer.Ordinal));
    }

    [Theory]
    [MemberData(nameof(Rooms))]
    public void A_room_refers_only_to_the_rooms_it_may_use(string room)
    {
        IEnumerable<string> referred = Project(room).Descendants("ProjectReference").Select(RoomOf);
        Assert.Empty(referred.Except(Reachable(room)));
    }

    [Theory]
    [MemberData(nameof(Rooms))]
    public void A_compiled_room_uses_only_the_rooms_it_may_use(string room)
    {
        string assembly = string.Equals(room, "Service", StringComparison.Ordinal) ? "labwatch" : "LabWatch." + room;
        IEnumerable<string> used = System.Reflection.Assembly.Load(assembly).GetReferencedAssemblies()
            .Select(name => name.Name!)
            .Where(name => name.StartsWith("LabWatch.", StringComparison.Ordinal))
            .Select(name => name["LabWatch.".Length..]);
        Assert.Empty(used.Except(Reachable(room)));
    }

    [Fact]
    public void Metrology_is_usable_alone_with_no_package_but_numerics()
    {
        IEnumerable<string> packages = Project("Metrology").Descendants("PackageReference").Select(reference => (string)reference.Attribute("Include")!);
        Assert.Equal(["MathNet.Numerics"], packages);
    }

    [Fact]
    public void Only_intake_and_the_simulator_know_mqtt()
    {
        IEnumerable<string> rooms = MayUse.Keys.Where(room => Project(room).Descendants("PackageReference")
            .Any(reference => ((string)reference.Attribute("Include")!).StartsWith("MQTTnet", StringComparison.Ordinal)));
        Assert.Equal(["Intake", "Simulator"], rooms.Order(StringComparer.Ordinal));
    }

    private static XDocument Project(string room) => XDocument.Load(RepositoryFiles.PathOf("src", $"LabWatch.{room}", $"LabWatch.{room}.csproj"));

    private static string RoomOf(XElement reference) =>
        Path.GetFileNameWithoutExtension(((string)reference.Attribute("Include")!).Replace('\\', '/'))["LabWatch.".Length..];

    private static HashSet<string> Reachable(string room)
    {
        HashSet<string> reached = [];
        Queue<string> open = new(MayUse[room]);
        while (open.TryDequeue(out string? next))
        {
            if (reached.Add(next))
            {
                MayUse[next].ToList().ForEach(open.Enqueue);
            }
        }

        return reached;
    }
}
