namespace LabWatch.Alerts.Mail;

/// <summary>How a connection to the mail server is made private.</summary>
public enum MailSecurity
{
    /// <summary>STARTTLS, demanded: without it nothing is sent (RFC 3207).</summary>
    StartTls,

    /// <summary>TLS from the first byte (RFC 8314).</summary>
    Tls,

    /// <summary>None: only for a server on this machine.</summary>
    None,
}
