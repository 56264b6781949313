using System.CommandLine;
using System.Globalization;

namespace LabWatch.Service.Commands;

/// <summary>Options that several commands share.</summary>
internal static class CommonOptions
{
    /// <summary>Where pages and API are served when nothing else is said: this machine alone.</summary>
    public const string DefaultUrls = "http://127.0.0.1:5080";

    public static Option<DirectoryInfo> Data { get; } = new("--data") { Description = "Directory that holds everything the service keeps.", HelpName = "DIR" };

    public static Option<string> Urls { get; } = new("--urls") { Description = "Where to serve pages and API; several separated by semicolons.", HelpName = "URLS", DefaultValueFactory = _ => DefaultUrls };

    public static Option<FileInfo> Config { get; } = new("--config") { Description = "File of options (JSON); environment variables LABWATCH__Section__Name go before it.", HelpName = "FILE" };

    /// <summary>An option whose value must lie between two bounds.</summary>
    public static Option<double> Bounded(string name, string description, double standard, double minimum, double maximum)
    {
        Option<double> option = new(name) { Description = description, HelpName = "N", DefaultValueFactory = _ => standard };
        option.CustomParser = result =>
        {
            string text = result.Tokens.Count == 1 ? result.Tokens[0].Value : string.Empty;
            if (double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out double value) && value >= minimum && value <= maximum)
            {
                return value;
            }

            result.AddError(FormattableString.Invariant($"{name}: \"{text}\" is not a number from {minimum} to {maximum}."));
            return standard;
        };
        return option;
    }
}
