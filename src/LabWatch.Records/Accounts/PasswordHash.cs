namespace LabWatch.Records.Accounts;

/// <summary>A salted, slow hash of a password with its parameters, as one line of text. Never shown: its text form says nothing.</summary>
/// <param name="Text">The line, for example <c>$argon2id$v=19$m=19456,t=2,p=1$SALT$HASH</c>.</param>
public sealed record PasswordHash(string Text)
{
    /// <inheritdoc/>
    public override string ToString() => "(hash)";
}
