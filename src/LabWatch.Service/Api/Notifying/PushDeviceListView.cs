using System.ComponentModel;

namespace LabWatch.Service.Api.Notifying;

/// <summary>The own devices.</summary>
internal sealed record PushDeviceListView(
    [property: Description("Key of this installation to subscribe with (RFC 8292), base64url.")] string PublicKey,
    [property: Description("The devices, oldest first.")] IReadOnlyList<PushDeviceView> Items);
