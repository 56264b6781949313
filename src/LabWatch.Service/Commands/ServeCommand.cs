using System.CommandLine;
using LabWatch.Lab.Findings;
using LabWatch.Service.Hosting;

namespace LabWatch.Service.Commands;

/// <summary><c>labwatch serve</c>: watches a laboratory, in a console, under systemd or as a Windows service.</summary>
internal static class ServeCommand
{
    public static Command Create()
    {
        Option<FileInfo> lab = new("--lab") { Description = "Lab file. Left out, the one in force since the last start goes on.", HelpName = "FILE" };
        Command command = new("serve", "Watch a laboratory.") { lab, LabFileOptions.Accept, LabFileOptions.Reason, CommonOptions.Data, CommonOptions.Urls, CommonOptions.Config };
        command.SetAction(async (parsed, cancellationToken) =>
        {
            TextWriter output = parsed.InvocationConfiguration.Output;
            TextWriter error = parsed.InvocationConfiguration.Error;
            (ServiceStart? start, IReadOnlyList<Finding> findings) = await StartPreparation.PrepareAsync(
                parsed.GetValue(CommonOptions.Data)?.FullName ?? DataDirectory.DefaultPath("labwatch"),
                parsed.GetValue(CommonOptions.Config)?.FullName,
                parsed.GetValue(CommonOptions.Urls)!,
                _ => TimeProvider.System,
                (_, _) => parsed.GetValue(lab) is { } file ? LabFileOptions.Read(file.FullName, parsed) : (null, null),
                null,
                cancellationToken);
            if (start is null)
            {
                FindingPrinter.Write(error, findings);
                return ExitCode.BadInput;
            }

            using (start.Data)
            {
                return await ServiceRun.RunAsync(
                    LabWatchHost.Build(start),
                    urls => Greeting.Serve(output, [.. urls], start),
                    error,
                    cancellationToken);
            }
        });
        return command;
    }
}
