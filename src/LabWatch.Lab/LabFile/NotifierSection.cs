using LabWatch.Lab.Alerts;

namespace LabWatch.Lab.LabFile;

/// <summary>One entry of the member <c>notifiers</c> of a lab file.</summary>
internal static class NotifierSection
{
    public static Notifier Read(JsonCursor item)
    {
        item.OnlyMembers("id", "kind", "address", "secretName");
        NotifierKind kind = item.Choice<NotifierKind>("kind");
        string? text = item.OptionalText("address", required: kind is NotifierKind.Webhook or NotifierKind.Mail);
        bool isMail = kind == NotifierKind.Mail;
        bool usable = Uri.TryCreate(isMail && text?.StartsWith("mailto:", StringComparison.Ordinal) == false ? "mailto:" + text : text, UriKind.Absolute, out Uri? address)
            && (isMail
                ? address.Scheme == Uri.UriSchemeMailto && address.UserInfo.Length > 0 && address.Host.Length > 0 && address.Query.Length == 0
                : address.Scheme == Uri.UriSchemeHttps || address.Scheme == Uri.UriSchemeHttp);
        if (text is not null && !usable)
        {
            item.Report(
                "bad-address", isMail ? "This is not an e-mail address." : "This is not an absolute http or https address.",
                isMail ? "Write one mailbox, for example duty@laboratory.example." : "Write it in full, for example https://messages.example/labwatch.", "address");
        }

        if (kind == NotifierKind.Push)
        {
            item.Report("not-in-a-file", "People subscribe their devices themselves, on their own page.", "Remove this notifier.", "kind");
        }

        return new Notifier(item.Id("id"), kind, usable ? address : null, item.OptionalText("secretName"));
    }
}
