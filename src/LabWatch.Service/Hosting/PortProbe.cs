using System.Net;
using System.Net.Sockets;
using LabWatch.Lab.Findings;

namespace LabWatch.Service.Hosting;

/// <summary>
/// Tries the ports that a start needs before anything runs, so that a taken one is a finding among the others and not an exception in the
/// middle of the start.
/// </summary>
internal static class PortProbe
{
    /// <summary>Whether a port of an address can be listened on now.</summary>
    public static bool IsFree(IPAddress address, int port)
    {
        try
        {
            using Socket socket = new(address.AddressFamily, SocketType.Stream, ProtocolType.Tcp);
            if (!OperatingSystem.IsWindows())
            {
                // As the servers do: connections of a former run that still fade out are no obstacle.
                socket.SetSocketOption(SocketOptionLevel.Socket, SocketOptionName.ReuseAddress, true);
            }

            socket.Bind(new IPEndPoint(address, port));
            socket.Listen(1);
            return true;
        }
        catch (SocketException)
        {
            return false;
        }
    }

    /// <summary>A port of this machine's loopback address that is free now.</summary>
    public static int FreePort()
    {
        using TcpListener listener = new(IPAddress.Loopback, 0);
        listener.Start();
        return ((IPEndPoint)listener.LocalEndpoint).Port;
    }

    /// <summary>A finding for each address of the pages that cannot be listened on. Names that are no addresses are left to the server.</summary>
    public static IEnumerable<Finding> CheckUrls(IEnumerable<Uri> urls)
    {
        foreach (Uri url in urls)
        {
            IPAddress? address = url.Host == "localhost" ? IPAddress.Loopback : IPAddress.TryParse(url.Host.Trim('[', ']'), out IPAddress? parsed) ? parsed : null;
            if (address is not null && url.Port > 0 && !IsFree(address, url.Port))
            {
                yield return new Finding(
                    "address-in-use", "--urls", "Pages and API cannot be served there: the address is taken or not this machine's.", url.GetLeftPart(UriPartial.Authority),
                    "Stop what is listening there, or choose another address with --urls.");
            }
        }
    }

    /// <summary>A finding where the embedded broker cannot listen.</summary>
    public static IEnumerable<Finding> CheckBroker(string option, string address, int port)
    {
        if (port > 0 && IPAddress.TryParse(address, out IPAddress? parsed) && !IsFree(parsed, port))
        {
            yield return new Finding(
                "address-in-use", option, "The embedded broker cannot listen there: the port is taken (another broker?) or the address is not this machine's.",
                FormattableString.Invariant($"{address}:{port}"), "Stop what is listening there, choose another port, or let LabWatch use that broker (Intake:ExternalBroker:Host).");
        }
    }
}
