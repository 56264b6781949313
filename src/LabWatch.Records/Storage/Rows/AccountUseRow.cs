namespace LabWatch.Records.Storage.Rows;

/// <summary>What changes with every sign-in, beside the revisions of the account.</summary>
internal sealed class AccountUseRow
{
    public required string Site { get; set; }

    public required string Name { get; set; }

    public long? LastSignInAt { get; set; }

    /// <summary>Refused sign-ins since the last one that succeeded.</summary>
    public int Failures { get; set; }

    public long? LastFailureAt { get; set; }
}
