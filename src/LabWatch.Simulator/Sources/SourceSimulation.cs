using LabWatch.Simulator.Faults;
using LabWatch.Simulator.Noise;
using LabWatch.Simulator.Room;

namespace LabWatch.Simulator.Sources;

/// <summary>One source in motion: controller, cut-out, purge and frost around its thermal network. Moves in whole seconds.</summary>
internal sealed class SourceSimulation
{
    private const double ControlLagSecond = 8;
    private const double ControlNoiseKelvin = 0.0004;
    private const double MainsRipple = 0.004;
    private const double DryGasDewPoint = -52;
    private const double DewPointLagSecond = 120;
    private const double CutoutResetKelvin = 30;
    private const double OxygenInAir = 20.9;

    private readonly long _seed;
    private readonly long _stream;
    private readonly SourceNetwork _network;
    private readonly PidController _controller;
    private readonly SourceSensors _sensors;
    private double _control;
    private double _heaterWatt;

    /// <summary>A source with everything at room temperature.</summary>
    public SourceSimulation(LabHistory history, SourceDesign design)
    {
        _seed = history.Seed;
        _stream = CounterNoise.Stream(design.Id + "/plant");
        Design = design;
        Truth = HiddenTruth.Draw(history.Seed, design);
        _network = new SourceNetwork(design, 21);
        _controller = new PidController(design.Tuning);
        _control = _network.ControlCelsius;
        DewPoint = 8;
        _sensors = new SourceSensors(history, this);
    }

    /// <summary>How it is built.</summary>
    public SourceDesign Design { get; }

    /// <summary>What is really the case.</summary>
    public HiddenTruth Truth { get; }

    /// <summary>The thermal network, for the sensors.</summary>
    public SourceNetwork Network => _network;

    /// <summary>What the faults did in the last second.</summary>
    public FaultEffects Effects { get; private set; } = FaultEffects.None;

    /// <summary>Set point of the last second, degree Celsius; NaN while off.</summary>
    public double SetPoint { get; private set; } = double.NaN;

    /// <summary>Heater power of the last second, W.</summary>
    public double HeaterWatt => _heaterWatt;

    /// <summary>Purge flow of the last second, l/min.</summary>
    public double PurgeFlow { get; private set; }

    /// <summary>Dew or frost point at the aperture, degree Celsius.</summary>
    public double DewPoint { get; private set; }

    /// <summary>Thickness of frost, 0 (none) to 1 (closed layer).</summary>
    public double Frost { get; private set; }

    /// <summary>Whether the shutter is open, or there is none.</summary>
    public bool ApertureOpen { get; private set; } = true;

    /// <summary>Whether the cut-out has tripped.</summary>
    public bool Tripped { get; private set; }

    /// <summary>Air around the source, degree Celsius.</summary>
    public double AirCelsius { get; private set; } = 21;

    /// <summary>Relative humidity of the room, percent.</summary>
    public double RelativeHumidity { get; private set; } = 45;

    /// <summary>Oxygen in the room, percent.</summary>
    public double Oxygen => OxygenInAir - (0.006 * PurgeFlow);

    /// <summary>Moves to the next second, which is given.</summary>
    public void Step(long second, RoomClimate room, FaultEffects effects)
    {
        Observe(second, room, effects);
        Control(second);
        Purge(room.DewPointCelsius);
        _network.SetPlant(_heaterWatt, ChillerRuns(), PurgeFlow, ApertureOpen, effects.InsulationBridge);
        _network.Network.Advance(1);
        Freeze();
        _sensors.Step(second);
    }

    /// <summary>Takes in what follows from the moment alone: faults, room, set point, shutter. A restored state needs it before it can be read.</summary>
    public void Observe(long second, RoomClimate room, FaultEffects effects)
    {
        Effects = effects;
        AirCelsius = room.AirCelsius;
        RelativeHumidity = room.RelativeHumidity;
        SetPoint = Design.Routine.At(second);
        ApertureOpen = !Design.HasShutter || effects.ShutterOpen || SetPointRoutine.InUse(second);
        _network.SetRoom(AirCelsius, AirCelsius + Truth.BackgroundKelvin);
    }

    /// <summary>Reads all sensors at the second that <see cref="Step"/> moved to, in units of each readout's last decimal; null where silent.</summary>
    public void Read(long second, Span<long?> values) => _sensors.Read(second, values);

    /// <summary>The state as it is now.</summary>
    public SourceState Capture() => new()
    {
        Nodes = _network.Network.Temperatures[.._network.NodeCount].ToArray(),
        Lags = [.. _sensors.Lags],
        Held = [.. _sensors.Held],
        Control = _control,
        Integral = _controller.Integral,
        RampedSetPoint = double.IsNaN(_controller.RampedSetPoint) ? null : _controller.RampedSetPoint,
        Previous = double.IsNaN(_controller.Previous) ? null : _controller.Previous,
        HeaterWatt = _heaterWatt,
        PurgeFlow = PurgeFlow,
        DewPoint = DewPoint,
        Frost = Frost,
        Tripped = Tripped,
    };

    /// <summary>Takes over a state of a source of the same design.</summary>
    public void Restore(SourceState state)
    {
        for (int i = 0; i < _network.NodeCount; i++)
        {
            _network.Network.SetTemperature(i, state.Nodes[i]);
        }

        state.Lags.CopyTo(_sensors.Lags, 0);
        state.Held.CopyTo(_sensors.Held, 0);
        _control = state.Control;
        _controller.Integral = state.Integral;
        _controller.RampedSetPoint = state.RampedSetPoint ?? double.NaN;
        _controller.Previous = state.Previous ?? double.NaN;
        _heaterWatt = state.HeaterWatt;
        PurgeFlow = state.PurgeFlow;
        DewPoint = state.DewPoint;
        Frost = state.Frost;
        Tripped = state.Tripped;
    }

    private void Control(long second)
    {
        _control += (_network.ControlCelsius - _control) / ControlLagSecond;
        double measured = _control + (ControlNoiseKelvin * CounterNoise.Gaussian(_seed, _stream, second));
        double wanted = _controller.Update(measured, SetPoint);
        double full = Design.Tuning.MaximumWatt;
        double given = double.IsNaN(Effects.RelayDuty) ? wanted : Effects.RelayDuty * full;

        // Somebody resets the cut-out, but not before the relay is repaired and the source has cooled.
        bool mayReset = double.IsNaN(Effects.RelayDuty) && _control <= Design.CutoutCelsius - CutoutResetKelvin;
        Tripped = _control > Design.CutoutCelsius || (Tripped && !mayReset);
        double mains = 1 + (MainsRipple * CounterNoise.Slow(_seed, _stream + 1, second, 60));
        _heaterWatt = Tripped ? 0 : given * mains;
    }

    private bool ChillerRuns() =>
        Design.Heat.ChillerConductance > 0
        && !double.IsNaN(SetPoint)
        && (_controller.RampedSetPoint < 35 || _control > _controller.RampedSetPoint + 1.5);

    private void Purge(double roomDewPoint)
    {
        bool on = !double.IsNaN(SetPoint) || _network.ControlCelsius > 200;
        PurgeFlow = on ? Design.Heat.PurgeFlow * (1 - Effects.PurgeLoss) : 0;
        double dryness = Design.Heat.PurgeFlow > 0 ? 1 - Math.Exp(-4 * PurgeFlow / Design.Heat.PurgeFlow) : 0;
        double target = roomDewPoint + ((DryGasDewPoint - roomDewPoint) * dryness);
        DewPoint += (target - DewPoint) / DewPointLagSecond;
    }

    // Frost grows where moist air meets the cold front of the cavity, melts above the ice point, and slowly goes into dry gas.
    private void Freeze()
    {
        double wall = _network.Celsius(0);
        double change = wall > 0 ? -1.0 / 600 : Math.Clamp((DewPoint - wall) / 20, -0.25, 1) / 1800;
        double least = wall < 0 ? Effects.Frost : 0;
        Frost = Math.Clamp(Frost + change, least, 1);
    }
}
