using LabWatch.Simulator.Sources;

namespace LabWatch.Simulator;

/// <summary>The invented laboratory <c>hollin-vale</c>: its four sources as the simulator builds them, and its lab file.</summary>
public static partial class DemoLab
{
    /// <summary>Id of the site.</summary>
    public const string Site = "hollin-vale";

    internal static IReadOnlyList<SourceDesign> Designs { get; } = [Fir(), Rowan(), Yew(), Hazel()];

    private static (double Lower, double Upper) LongWave => (8, 14);

    private static SourceDesign Fir() => new(
        "fir",
        new CavityDesign(30, 180, 25, 60),
        new HeatDesign
        {
            RingCapacity = 36,
            BottomCapacity = 34,
            AxialConductance = 12,
            HeaterCapacity = 220,
            HeaterConductance = 18,
            FluidCapacity = 25_000,
            FluidToWallConductance = 4,
            ChillerConductance = 4.5,
            CoolantCelsius = -48,
            InsulationCapacity = 500,
            InsulationConductance = 0.75,
            CaseCapacity = 3_200,
            CaseToRoomConductance = 6,
            LipCapacity = 160,
            LipToWallConductance = 0.06,
            LipToRoomConductance = 0.35,
            ConvectionKelvin = 0.001,
            PurgeFlow = 6,
            PurgeConductancePerFlow = 0.016,
        },
        new PidTuning(900, 420, 240, 0, 2),
        110,
        new TruthDesign(0.94, 1e-4, 0.6, 0.004, Bands(("8-14", 0.955))),
        new SetPointRoutine(20, [
            [(4.5, -20), (10, 0), (13.5, 30)],
            [(6, 0), (10, 25), (13, 50)],
            [(6, 50), (11, 70), (14.5, 90)]]),
        [
            Well("well-bottom", 172, 100.0123, 9, 0.004),
            Well("well-middle", 95, 99.9871, 9, 0.005),
            Well("well-front", 25, 100.0317, 9, 0.005),
            new ChannelDesign("bath-indicator", ChannelRole.Well, "Cel", 3, 0.0012) { PositionMillimetre = 140, LagSecond = 14, ErrorKelvin = 0.006, DriftKelvinPerYear = 0.01, KnownErrorKelvin = 0.021, ScaleError = 2e-4 },
            SetPoint(2),
            new ChannelDesign("heater-power", ChannelRole.HeaterPower, "W", 1, 0.25),
            new ChannelDesign("purge-flow", ChannelRole.PurgeFlow, "l/min", 2, 0.012),
            new ChannelDesign("dew-point", ChannelRole.DewPoint, "Cel", 1, 0.06),
            Case(),
            Lip(0.02),
            Ambient(),
            Humidity(),
            Comparator("comparator-8-14", "8-14", LongWave, 2, 0.012, 0.05, -60),
            new ChannelDesign("stirrer-speed", ChannelRole.Stirrer, "1/min", 0, 1.1),
        ]);

    private static SourceDesign Rowan() => new(
        "rowan",
        new CavityDesign(25, 200, 20, 60),
        new HeatDesign
        {
            RingCapacity = 340,
            BottomCapacity = 300,
            AxialConductance = 13,
            HeaterCapacity = 300,
            HeaterConductance = 16,
            FrontBoost = 0.55,
            InsulationCapacity = 700,
            InsulationConductance = 0.2,
            CaseCapacity = 1_500,
            CaseToRoomConductance = 5.5,
            LipCapacity = 260,
            LipToWallConductance = 0.14,
            LipToRoomConductance = 0.5,
            ConvectionKelvin = 0.003,
        },
        new PidTuning(1_500, 75, 260, 0, 6),
        525,
        new TruthDesign(0.92, 6e-5, 0.8, 0.006, Bands(("8-14", 0.945), ("3-5", 0.925))),
        new SetPointRoutine(300, [
            [(6, 350), (11, 400), (14, 450)],
            [(5, 200), (10, 300), (13.5, 400)],
            [(1, 100), (10, 150), (13, 250)],
            [(6, 300), (10, 400), (13, 500)]]),
        [
            Well("well-bottom", 190, 100.0442, 12, 0.008),
            Well("well-middle", 110, 99.9765, 12, 0.01),
            Well("well-front", 30, 100.0088, 12, 0.01),
            new ChannelDesign("block-indicator", ChannelRole.Well, "Cel", 2, 0.012) { PositionMillimetre = 150, LagSecond = 18, ErrorKelvin = 0.08, DriftKelvinPerYear = 0.15, KnownErrorKelvin = -0.35, ScaleError = 9e-4 },
            SetPoint(1),
            new ChannelDesign("heater-power", ChannelRole.HeaterPower, "W", 1, 0.4),
            Case(),
            Lip(0.03),
            Ambient(),
            Humidity(),
            Comparator("comparator-8-14", "8-14", LongWave, 2, 0.015, 0.12, -20),
            Comparator("comparator-3-5", "3-5", (3, 5), 2, 0.012, 0.1, 15),
            new ChannelDesign("shutter", ChannelRole.Shutter, "/", 0, 0),
            new ChannelDesign("cut-out", ChannelRole.Cutout, "/", 0, 0),
        ]);

    private static SourceDesign Yew() => new(
        "yew",
        new CavityDesign(20, 250, 14, null),
        new HeatDesign
        {
            RingCapacity = 48,
            BottomCapacity = 45,
            AxialConductance = 1.2,
            HeaterCapacity = 0,
            HeaterConductance = 0,
            FrontBoost = 0.7,
            InsulationCapacity = 4_000,
            InsulationConductance = 1.5,
            CaseCapacity = 8_000,
            CaseToRoomConductance = 8,
            CaseToWaterConductance = 160,
            CoolantCelsius = 17,
            LipCapacity = 900,
            LipToWallConductance = 0.03,
            LipToRoomConductance = 2.5,
            ConvectionKelvin = 0.06,
            PurgeFlow = 4,
            PurgeConductancePerFlow = 0.014,
        },
        new PidTuning(7_000, 28, 60, 0, 25),
        1_560,
        new TruthDesign(0.9, 1e-4, 1.0, 0.01, Bands(("0-9", 0.87))),
        new SetPointRoutine(double.NaN, [
            [(6.5, 800), (10, 1000), (13.5, 1200)],
            [(6.5, 1000), (10.5, 1200), (14, 1500)]]),
        [
            Thermocouple("well-bottom", 240, 0.6, 4e-4),
            Thermocouple("well-middle", 130, -0.9, 7e-4),
            Thermocouple("well-front", 30, 0.4, -5e-4),
            SetPoint(1),
            new ChannelDesign("heater-power", ChannelRole.HeaterPower, "W", 0, 2.5),
            new ChannelDesign("purge-flow", ChannelRole.PurgeFlow, "l/min", 2, 0.01),
            Case(),
            Lip(0.04),
            Ambient(),
            Humidity(),
            new ChannelDesign("room-oxygen", ChannelRole.Oxygen, "%", 2, 0.008),
            new ChannelDesign("cooling-flow", ChannelRole.CoolingFlow, "l/min", 2, 0.015),
            Comparator("comparator-0-9", "0-9", (0.9, 0.9), 2, 0.02, 0.3, 600),
            new ChannelDesign("shutter", ChannelRole.Shutter, "/", 0, 0),
            new ChannelDesign("cut-out", ChannelRole.Cutout, "/", 0, 0),
        ]);

    private static SourceDesign Hazel() => new(
        "hazel",
        new CavityDesign(20, 120, 12, 60),
        new HeatDesign
        {
            RingCapacity = 150,
            BottomCapacity = 140,
            AxialConductance = 9,
            HeaterCapacity = 60,
            HeaterConductance = 8,
            FrontBoost = 0.2,
            InsulationCapacity = 60,
            InsulationConductance = 0.16,
            CaseCapacity = 600,
            CaseToRoomConductance = 2.2,
            LipCapacity = 60,
            LipToWallConductance = 0.04,
            LipToRoomConductance = 0.12,
            ConvectionKelvin = 0.0003,
        },
        new PidTuning(45, 30, 150, 0, 1),
        50,
        new TruthDesign(0.95, 1.5e-4, 0.5, 0.003, Bands(("8-14", 0.96))),
        new SetPointRoutine(37, [
            [(6, 37)],
            [(6, 35), (11, 37), (14, 39)]]),
        [
            Well("well-bottom", 112, 99.9934, 7, 0.002),
            Well("well-middle", 65, 100.0206, 7, 0.0025),
            Well("well-front", 20, 100.0051, 7, 0.0025),
            new ChannelDesign("indicator", ChannelRole.Well, "Cel", 3, 0.0009) { PositionMillimetre = 90, LagSecond = 10, ErrorKelvin = 0.003, DriftKelvinPerYear = 0.006, KnownErrorKelvin = -0.012, ScaleError = 1e-4 },
            SetPoint(2),
            new ChannelDesign("heater-power", ChannelRole.HeaterPower, "W", 2, 0.006),
            Case(),
            Lip(0.02),
            Ambient(),
            Humidity(),
            Comparator("comparator-8-14", "8-14", LongWave, 2, 0.01, 0.03, -20),
            new ChannelDesign("shutter", ChannelRole.Shutter, "/", 0, 0),
        ]);

    // Bridge readout of a Pt100: resolution 10 micro-ohm (0.026 mK), noise 25 micro-ohm (0.065 mK).
    private static ChannelDesign Well(string id, double position, double r0, double lag, double error) =>
        new(id, ChannelRole.Well, "Ohm", 5, 2.5e-5)
        {
            PositionMillimetre = position,
            LagSecond = lag,
            ErrorKelvin = error,
            DriftKelvinPerYear = error,
            Resistance = new PlatinumResistance(r0),
        };

    private static ChannelDesign Thermocouple(string id, double position, double knownError, double scaleError) =>
        new(id, ChannelRole.Well, "Cel", 2, 0.025)
        {
            PositionMillimetre = position,
            LagSecond = 6,
            ErrorKelvin = 0.6,
            DriftKelvinPerYear = 1.2,
            KnownErrorKelvin = knownError,
            ScaleError = scaleError,
        };

    private static ChannelDesign SetPoint(int decimals) => new("set-point", ChannelRole.SetPoint, "Cel", decimals, 0);

    private static ChannelDesign Case() => new("outer-case", ChannelRole.OuterCase, "Cel", 2, 0.015) { LagSecond = 10, ErrorKelvin = 0.2, DriftKelvinPerYear = 0.05 };

    private static ChannelDesign Lip(double noise) => new("aperture-lip", ChannelRole.Lip, "Cel", 2, noise) { LagSecond = 10, ErrorKelvin = 0.2, DriftKelvinPerYear = 0.05 };

    private static ChannelDesign Ambient() => new("ambient", ChannelRole.Ambient, "Cel", 2, 0.008) { LagSecond = 30, ErrorKelvin = 0.06, DriftKelvinPerYear = 0.03 };

    private static ChannelDesign Humidity() => new("humidity", ChannelRole.Humidity, "%RH", 1, 0.05) { LagSecond = 30 };

    private static ChannelDesign Comparator(string id, string band, (double, double) edges, int decimals, double noise, double error, double minimum) =>
        new(id, ChannelRole.Comparator, "Cel", decimals, noise) { Band = band, BandEdges = edges, ErrorKelvin = error, DriftKelvinPerYear = error, MinimumCelsius = minimum };

    private static Dictionary<string, double> Bands(params (string Id, double Emissivity)[] bands) =>
        bands.ToDictionary(band => band.Id, band => band.Emissivity, StringComparer.Ordinal);
}
