namespace LabWatch.Records.Accounts;

/// <summary>What became of a change of an account.</summary>
public enum AccountOutcome
{
    /// <summary>It was made, or there was nothing to change.</summary>
    Done,

    /// <summary>There is no such account.</summary>
    Unknown,

    /// <summary>The name was given before.</summary>
    NameTaken,

    /// <summary>Nobody would be left who can look after accounts.</summary>
    LastAdministrator,

    /// <summary>There are accounts already.</summary>
    NotTheFirst,
}
