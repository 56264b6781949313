using System.Text.Json;

namespace LabWatch.Simulator.Demo;

/// <summary>The file that holds a demo's state. Replaced as a whole, so that a crash leaves the old or the new one.</summary>
internal sealed class DemoStateFile(string dataDirectory)
{
    private readonly Lock _gate = new();
    private readonly string _directory = Path.Combine(dataDirectory, "demo");

    /// <summary>The state; null where there is none yet. Throws <see cref="InvalidDataException"/> for a file that this program cannot use.</summary>
    public DemoState? Read()
    {
        if (!File.Exists(PathOfState))
        {
            return null;
        }

        try
        {
            DemoState? state = JsonSerializer.Deserialize(File.ReadAllBytes(PathOfState), DemoStateJson.Default.DemoState);
            return state is { Format: DemoState.PresentFormat }
                ? state
                : throw new InvalidDataException($"{PathOfState} has a format that this program does not know. Start the demo with another data directory.");
        }
        catch (JsonException error)
        {
            throw new InvalidDataException($"{PathOfState} cannot be read. Start the demo with another data directory.", error);
        }
    }

    /// <summary>Writes the state and makes it durable.</summary>
    public void Write(DemoState state)
    {
        lock (_gate)
        {
            Directory.CreateDirectory(_directory);
            string temporary = PathOfState + ".new";
            using (FileStream stream = new(temporary, FileMode.Create, FileAccess.Write, FileShare.None))
            {
                JsonSerializer.Serialize(stream, state, DemoStateJson.Default.DemoState);
                stream.Flush(flushToDisk: true);
            }

            File.Move(temporary, PathOfState, overwrite: true);
        }
    }

    private string PathOfState => Path.Combine(_directory, "state.json");
}
