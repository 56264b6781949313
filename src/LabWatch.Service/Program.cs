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
    CalcCommand.Create(),
};
return await root.Parse(args).InvokeAsync();
