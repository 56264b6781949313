namespace LabWatch.Simulator.Faults;

/// <summary>What all faults of one source together do in one second.</summary>
internal sealed class FaultEffects
{
    /// <summary>No fault at all.</summary>
    public static FaultEffects None { get; } = new();

    /// <summary>Fall of the coating's emissivity.</summary>
    public double EmissivityFall { get; private set; }

    /// <summary>Share of the purge flow that is lost, 0 to 1.</summary>
    public double PurgeLoss { get; private set; }

    /// <summary>Least thickness of frost.</summary>
    public double Frost { get; private set; }

    /// <summary>Share of full power that a stuck relay gives; NaN where the relay works.</summary>
    public double RelayDuty { get; private set; } = double.NaN;

    /// <summary>Thermal bridge through the insulation, W/K.</summary>
    public double InsulationBridge { get; private set; }

    /// <summary>Whether the shutter cannot close.</summary>
    public bool ShutterOpen { get; private set; }

    /// <summary>Error of the device's clock, seconds.</summary>
    public double ClockSkew { get; private set; }

    /// <summary>Errors of thermometers and comparators, kelvin, by channel.</summary>
    public IReadOnlyDictionary<string, double> Errors => _errors;

    /// <summary>Channels that repeat their last value.</summary>
    public IReadOnlySet<string> Stuck => _stuck;

    /// <summary>Channels that send nothing.</summary>
    public IReadOnlySet<string> Silent => _silent;

    private readonly Dictionary<string, double> _errors = new(StringComparer.Ordinal);
    private readonly HashSet<string> _stuck = new(StringComparer.Ordinal);
    private readonly HashSet<string> _silent = new(StringComparer.Ordinal);

    /// <summary>Adds one fault with its present size. Growing shares add up and are cut to what is possible.</summary>
    public void Add(FaultOrder order, double size)
    {
        string channel = order.Channel ?? string.Empty;
        switch (order.Kind)
        {
            case FaultKind.ThermometerDrift or FaultKind.ComparatorDrift:
                _errors[channel] = _errors.GetValueOrDefault(channel) + size;
                break;
            case FaultKind.ThermometerStuck:
                _stuck.Add(channel);
                break;
            case FaultKind.SensorSilent:
                _silent.Add(channel);
                break;
            case FaultKind.CoatingFall:
                EmissivityFall = Math.Min(0.9, EmissivityFall + size);
                break;
            case FaultKind.PurgeLoss:
                PurgeLoss = Math.Min(1, PurgeLoss + size);
                break;
            case FaultKind.Frost:
                Frost = Math.Max(Frost, size);
                break;
            case FaultKind.HeaterRelayStuck:
                RelayDuty = double.IsNaN(RelayDuty) ? size : Math.Max(RelayDuty, size);
                break;
            case FaultKind.InsulationDamage:
                InsulationBridge += size;
                break;
            case FaultKind.OpenShutter:
                ShutterOpen = true;
                break;
            case FaultKind.ClockSkew:
                ClockSkew += size;
                break;
            default:
                throw new ArgumentOutOfRangeException(nameof(order), order.Kind, "Not a kind of fault.");
        }
    }
}
