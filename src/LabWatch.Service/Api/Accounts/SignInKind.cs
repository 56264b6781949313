namespace LabWatch.Service.Api.Accounts;

/// <summary>What became of a sign-in.</summary>
internal enum SignInKind
{
    /// <summary>The person is signed in.</summary>
    Done,

    /// <summary>Name or password is wrong.</summary>
    Wrong,

    /// <summary>Too many attempts on this name.</summary>
    TooMany,

    /// <summary>Too many sign-ins are being checked.</summary>
    Busy,
}
