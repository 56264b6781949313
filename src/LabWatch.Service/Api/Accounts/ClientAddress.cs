namespace LabWatch.Service.Api.Accounts;

/// <summary>The address that a request comes from; behind named proxies the one that they name.</summary>
internal static class ClientAddress
{
    /// <summary>The address as text.</summary>
    public static string Of(HttpContext http) => http.Connection.RemoteIpAddress is { } address
        ? (address.IsIPv4MappedToIPv6 ? address.MapToIPv4() : address).ToString()
        : "unknown";

    /// <summary>What counts as one address for limits: an IPv6 subscriber has a whole /64.</summary>
    public static string Network(HttpContext http)
    {
        System.Net.IPAddress? address = http.Connection.RemoteIpAddress;
        if (address is null || address.IsIPv4MappedToIPv6 || address.AddressFamily is not System.Net.Sockets.AddressFamily.InterNetworkV6)
        {
            return Of(http);
        }

        return Convert.ToHexStringLower(address.GetAddressBytes().AsSpan(0, 8));
    }
}
