using System.CommandLine;
using System.Text;
using LabWatch.Intake.Options;
using LabWatch.Lab.Findings;
using LabWatch.Lab.Time;
using LabWatch.Service.Api.Accounts;
using LabWatch.Service.Configuration;
using LabWatch.Service.Hosting;
using LabWatch.Simulator;
using LabWatch.Simulator.Demo;

namespace LabWatch.Service.Commands;

/// <summary><c>labwatch demo</c>: the whole service on an invented laboratory whose telemetry is simulated.</summary>
internal static class DemoCommand
{
    private static readonly Option<double> Port = CommonOptions.Bounded("--mqtt-port", "Port of the embedded broker, on this machine alone.", 1883, 1, 65535);
    private static readonly Option<double> Speed = CommonOptions.Bounded("--speed", "Seconds of the laboratory in one second.", 1, 0.1, 1000);
    private static readonly Option<double> Days = CommonOptions.Bounded("--days", "Days of history made at the first start.", DemoOptions.DefaultDays, 0, 400);
    private static readonly Option<double> Seed = CommonOptions.Bounded("--seed", "Number that the hidden truth, the weather and the faults are drawn from.", DemoOptions.DefaultSeed, 0, 1e9);

    public static Command Create()
    {
        Command command = new("demo", "Watch an invented laboratory of four sources with simulated telemetry.")
        {
            CommonOptions.Data, CommonOptions.Urls, CommonOptions.Config, Port, Speed, Days, Seed,
        };
        command.SetAction(RunAsync);
        return command;
    }

    private static async Task<int> RunAsync(ParseResult parsed, CancellationToken cancellationToken)
    {
        TextWriter error = parsed.InvocationConfiguration.Error;
        double speed = parsed.GetValue(Speed);
        (ServiceStart? start, IReadOnlyList<Finding> findings) = await StartPreparation.PrepareAsync(
            parsed.GetValue(CommonOptions.Data)?.FullName ?? DataDirectory.DefaultPath("labwatch-demo"),
            parsed.GetValue(CommonOptions.Config)?.FullName,
            parsed.GetValue(CommonOptions.Urls)!,
            data => DemoClock.Resume(data.Path, speed, TimeProvider.System),
            GiveLab,
            settings => ForDemo(settings, BrokerPort(parsed)),
            cancellationToken);
        if (start is null)
        {
            FindingPrinter.Write(error, findings);
            return ExitCode.BadInput;
        }

        EmbeddedBrokerOptions broker = start.Settings.Intake.EmbeddedBroker!;
        DemoOptions demo = new((int)parsed.GetValue(Days), (long)parsed.GetValue(Seed), broker.Address, broker.Port, start.Data.Path) { TopicRoot = start.Settings.Intake.Root };
        DemoCredentials people = DemoCredentials.For(DemoPeople.All.Select(person => person.Name));
        using (start.Data)
        {
            return await ServiceRun.RunAsync(
                LabWatchHost.Build(start, services =>
                {
                    services.AddLabWatchDemo(demo);
                    services.AddHostedService<DemoClockKeeper>();
                    services.AddSingleton(people);
                    services.AddHostedService<DemoPeople>();
                }),
                urls => Greeting.Demo(parsed.InvocationConfiguration.Output, [.. urls], start, speed, people),
                error,
                cancellationToken);
        }
    }

    private const int UnsealedReadings = 400_000;

    // The simulated devices publish to the embedded broker, on this machine alone. A history of weeks arrives in minutes: a low bound
    // on what waits unsealed keeps the memory of the demo small.
    private static ServiceSettings ForDemo(ServiceSettings settings, int port) => settings with
    {
        Intake = settings.Intake with
        {
            EmbeddedBroker = (settings.Intake.EmbeddedBroker ?? new EmbeddedBrokerOptions()) with { Address = "127.0.0.1", Port = port },
            ExternalBroker = null,
        },
        Readings = settings.Readings with { UnsealedReadingsLimit = UnsealedReadings },
    };

    // A machine with a broker of its own has the usual port taken; the demo then takes a free one, unless a port was asked for.
    private static int BrokerPort(ParseResult parsed)
    {
        int port = (int)parsed.GetValue(Port);
        bool isAskedFor = parsed.GetResult(Port) is { Implicit: false };
        return isAskedFor || PortProbe.IsFree(System.Net.IPAddress.Loopback, port) ? port : PortProbe.FreePort();
    }

    // The first start writes the lab file for its day; later starts go on with the one in force.
    private static (LabOrder? Order, Finding? Finding) GiveLab(DataDirectory data, TimeProvider clock) =>
        (new LabOrder(Encoding.UTF8.GetBytes(DemoLab.LabFileFor(Instant.Now(clock))), "the demo's lab file", "labwatch") { IsFirst = true }, null);
}
