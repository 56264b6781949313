using System.CommandLine;
using LabWatch.Lab;
using LabWatch.Lab.Findings;
using LabWatch.Lab.LabFile;
using LabWatch.Lab.Time;
using LabWatch.Records;
using LabWatch.Records.Accounts;
using LabWatch.Records.Accounts.Passwords;
using LabWatch.Service.Configuration;
using LabWatch.Service.Hosting;

namespace LabWatch.Service.Commands;

/// <summary><c>labwatch account</c>: helps a locked-out administrator, on the machine itself and with the service stopped.</summary>
internal static class AccountCommand
{
    public static Command Create()
    {
        Argument<string> name = new("NAME") { Description = "Name of the account." };
        Command reset = new("reset", "Give an account a one-time password, and open it again where it is closed.") { name, CommonOptions.Data, CommonOptions.Config };
        reset.SetAction((parsed, cancellationToken) => ResetAsync(
            parsed.GetValue(name)!,
            parsed.GetValue(CommonOptions.Data)?.FullName ?? DataDirectory.DefaultPath("labwatch"),
            parsed.GetValue(CommonOptions.Config)?.FullName,
            parsed.InvocationConfiguration,
            cancellationToken));
        return new Command("account", "Help a locked-out person, with the service stopped.") { reset };
    }

    private static async Task<int> ResetAsync(string name, string dataPath, string? configFile, InvocationConfiguration console, CancellationToken cancellationToken)
    {
        if (!Directory.Exists(dataPath))
        {
            return Refuse(console, [new Finding("no-data", "--data", "There is no such data directory.", dataPath, "Name the directory that the service uses.")]);
        }

        (DataDirectory? data, Finding? finding) = DataDirectory.Open(dataPath);
        if (data is null)
        {
            return Refuse(console, [finding!]);
        }

        using (data)
        {
            (ServiceSettings? settings, IReadOnlyList<Finding> findings) = Settings(configFile, data);
            string cache = LabSnapshotSource.CachePath(data.Path);
            (ReadOnlyMemory<byte>? text, string? problem) = LabSnapshotSource.ReadFile(cache);
            LabSnapshot? lab = text is { } known ? LabFileReader.Read(known).Snapshot : null;
            if (settings is null || lab is null)
            {
                return Refuse(console, [.. findings, .. lab is null ? [LabSnapshotSource.Unreadable(cache, problem ?? "it is damaged")] : Array.Empty<Finding>()]);
            }

            return await ResetAsync(name, lab.Site.Id, settings, console, cancellationToken);
        }
    }

    private static async Task<int> ResetAsync(string name, string site, ServiceSettings settings, InvocationConfiguration console, CancellationToken cancellationToken)
    {
        await using ServiceProvider services = new ServiceCollection().AddLabWatchRecords(settings.Records).BuildServiceProvider();
        using PasswordHasher hasher = new(PasswordCost.Standard);
        string password = OneTimePassword.Draw();
        PasswordHash? hash = await hasher.HashAsync(password, cancellationToken);
        AccountChange change = new() { Password = hash, MustChangePassword = true, IsDisabled = false };
        try
        {
            AccountOutcome outcome = await services.GetRequiredService<IAccountLedger>().ChangeAsync(site, name, change, "labwatch", Instant.Now(TimeProvider.System), cancellationToken);
            if (outcome is not AccountOutcome.Done)
            {
                IReadOnlyList<Account> known = await services.GetRequiredService<IAccountLedger>().ListAsync(site, cancellationToken);
                string names = known.Count == 0 ? "There are no accounts yet: start the service and use the code that it prints." : "The accounts are: " + string.Join(", ", known.Select(account => account.Name)) + ".";
                return Refuse(console, [new Finding("unknown-account", "NAME", "There is no such account.", Finding.Quote(name), names)]);
            }
        }
        catch (RecordsUnavailableException failure)
        {
            return Refuse(console, [new Finding("records-unavailable", "Records", failure.Message, null, "Let the database answer, and try again.")]);
        }

        await console.Output.WriteLineAsync($"One-time password of {name}: {password}");
        await console.Output.WriteLineAsync("Start the service, sign in with it and choose a password of your own. All sessions of the account have ended; the trail says that it was reset here.");
        return ExitCode.Success;
    }

    private static (ServiceSettings? Settings, IReadOnlyList<Finding> Findings) Settings(string? configFile, DataDirectory data)
    {
        (IConfigurationRoot? configuration, IReadOnlyList<Finding> unreadable) = SettingsReader.Load(configFile);
        if (configuration is null)
        {
            return (null, unreadable);
        }

        (ServiceSettings settings, IReadOnlyList<Finding> findings) = SettingsReader.Read(configuration, data.Path, InstallationId.Of(data.Path));
        return findings.Count > 0 ? (null, findings) : (settings, []);
    }

    private static int Refuse(InvocationConfiguration console, IReadOnlyList<Finding> findings)
    {
        FindingPrinter.Write(console.Error, findings);
        return ExitCode.BadInput;
    }
}
