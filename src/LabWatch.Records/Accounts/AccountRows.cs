using LabWatch.Lab.Time;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Accounts;

/// <summary>Rows of accounts to accounts and back.</summary>
internal static class AccountRows
{
    /// <summary>The newest revision of each account of a site.</summary>
    public static IQueryable<AccountRow> Newest(RecordsContext context, string site) =>
        context.Accounts.Where(row => row.Site == site
            && !context.Accounts.Any(later => later.Site == site && later.Name == row.Name && later.Revision > row.Revision));

    /// <summary>The account of a name; null where there is none.</summary>
    public static async Task<Account?> FindAsync(RecordsContext context, string site, string name, CancellationToken cancellationToken)
    {
        AccountRow? row = await Newest(context, site).FirstOrDefaultAsync(row => row.Name == name, cancellationToken);
        if (row is null)
        {
            return null;
        }

        long created = await context.Accounts.Where(first => first.Site == site && first.Name == name && first.Revision == 1).Select(first => first.At).FirstAsync(cancellationToken);
        AccountUseRow? use = await context.AccountUse.AsNoTracking().FirstOrDefaultAsync(use => use.Site == site && use.Name == name, cancellationToken);
        return ToAccount(row, created, use);
    }

    public static Account ToAccount(AccountRow row, long created, AccountUseRow? use) => new(
        row.Name,
        row.Revision,
        row.DisplayName,
        RoleWords.Split(row.Roles),
        row.Disabled,
        row.MustChangePassword,
        row.Password is null ? null : new PasswordHash(row.Password),
        new Instant(created),
        use?.LastSignInAt is { } last ? new Instant(last) : null,
        use?.Failures ?? 0);

    public static AccountRow ToRow(string site, Account account, int revision, string by, Instant at) => new()
    {
        Site = site,
        Name = account.Name,
        Revision = revision,
        DisplayName = account.DisplayName,
        Roles = RoleWords.Join(account.Roles),
        Disabled = account.IsDisabled,
        MustChangePassword = account.MustChangePassword,
        Password = account.Password?.Text,
        At = at.Microseconds,
        By = by,
    };

    /// <summary>The row of what changes with every sign-in, made where there is none yet.</summary>
    public static async Task<AccountUseRow> UseAsync(RecordsContext context, string site, string name, CancellationToken cancellationToken)
    {
        AccountUseRow? use = await context.AccountUse.FindAsync([site, name], cancellationToken);
        if (use is null)
        {
            use = new AccountUseRow { Site = site, Name = name };
            context.AccountUse.Add(use);
        }

        return use;
    }
}
