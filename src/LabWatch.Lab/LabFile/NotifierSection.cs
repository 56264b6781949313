using LabWatch.Lab.Alerts;

namespace LabWatch.Lab.LabFile;

/// <summary>One entry of the member <c>notifiers</c> of a lab file.</summary>
internal static class NotifierSection
{
    public static Notifier Read(JsonCursor item)
    {
        item.OnlyMembers("id", "kind", "address", "secretName");
        NotifierKind kind = item.Choice<NotifierKind>("kind");
        string? text = item.OptionalText("address", required: kind == NotifierKind.Webhook);
        bool usable = Uri.TryCreate(text, UriKind.Absolute, out Uri? address)
            && (address.Scheme == Uri.UriSchemeHttps || address.Scheme == Uri.UriSchemeHttp);
        if (text is not null && !usable)
        {
            item.Report("bad-address", "This is not an absolute http or https address.", "Write it in full, for example https://messages.example/labwatch.", "address");
        }

        return new Notifier(item.Id("id"), kind, usable ? address : null, item.OptionalText("secretName"));
    }
}
