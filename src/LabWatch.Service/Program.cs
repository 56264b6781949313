using System.CommandLine;
using System.Globalization;
using LabWatch.Service.Calc;
using LabWatch.Service.Commands;

CultureInfo.DefaultThreadCurrentCulture = CultureInfo.InvariantCulture;
CultureInfo.DefaultThreadCurrentUICulture = CultureInfo.InvariantCulture;

RootCommand root = new("Watches the reference blackbody sources of a calibration laboratory. It is not a protective device.")
{
    DemoCommand.Create(),
    ServeCommand.Create(),
    CheckConfigCommand.Create(),
    ImportCommand.Create(),
    TransferCommand.Create(),
    VerifyCommand.Create(),
    BackupCommand.Create(),
    RestoreCommand.Create(),
    RetentionCommand.Create(),
    RecomputeCommand.Create(),
    AccountCommand.Create(),
    CalcCommand.Create(),
};

// The host hears SIGTERM and Ctrl-C itself and takes its own time to end; a second listener would cut it off after two seconds, with exit code 143.
return await root.Parse(args).InvokeAsync(new InvocationConfiguration { ProcessTerminationTimeout = null });
