using LabWatch.Service.Api.Accounts;
using LabWatch.Service.Hosting;
using LabWatch.Service.Web;

namespace LabWatch.Service.Commands;

/// <summary>What is printed once pages and API are served.</summary>
internal static class Greeting
{
    /// <summary>Of the demo: where to look, and as whom.</summary>
    public static void Demo(TextWriter output, IReadOnlyList<string> urls, ServiceStart start, double speed, DemoCredentials people)
    {
        string pace = speed == 1 ? string.Empty : FormattableString.Invariant($", {speed} times faster than the clock");
        output.WriteLine();
        output.WriteLine($"  {start.Lab.Current.Site.Name}: an invented laboratory, its telemetry simulated{pace}.");
        output.WriteLine();
        output.WriteLine($"  Open  {string.Join("  or  ", urls)}");
        output.WriteLine();
        output.WriteLine("  and sign in with a name and its code, or by one of these addresses:");
        output.WriteLine();
        int width = people.Codes.Max(code => code.Name.Length);
        foreach ((string name, string code) in people.Codes)
        {
            output.WriteLine($"    {name.PadRight(width)}  {code}  {urls[0]}/sign-in#name={name}&code={code}");
        }

        output.WriteLine();
        output.WriteLine("  Codes are drawn anew at each start and worth nothing once this one has ended.");
        output.WriteLine();
        output.WriteLine($"  MQTT  127.0.0.1:{start.Settings.Intake.EmbeddedBroker!.Port}");
        output.WriteLine($"  Data  {start.Data.Path}  (a later start goes on from there)");
        Certificate(output, "  TLS   ", start.Certificate);
        output.WriteLine("  LabWatch is not a protective device. Ctrl-C ends it.");
        output.WriteLine();
    }

    /// <summary>Of a laboratory's service.</summary>
    public static void Serve(TextWriter output, IReadOnlyList<string> urls, ServiceStart start)
    {
        output.WriteLine($"LabWatch watches {start.Lab.Current.Site.Name} at {string.Join(" and ", urls)}. It is not a protective device. Ctrl-C ends it.");
        Certificate(output, string.Empty, start.Certificate);
    }

    private static void Certificate(TextWriter output, string indent, CertificateKeeper? certificate)
    {
        if (certificate is not null)
        {
            output.WriteLine($"{indent}{(certificate.IsOwn ? "Self-signed certificate: compare it once when a browser warns." : "Certificate.")} SHA-256 {certificate.Current.Fingerprint}");
        }
    }
}
