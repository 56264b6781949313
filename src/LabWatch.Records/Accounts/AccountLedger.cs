using LabWatch.Lab.Time;
using LabWatch.Records.Audit;
using LabWatch.Records.Storage;
using LabWatch.Records.Storage.Rows;
using Microsoft.EntityFrameworkCore;

namespace LabWatch.Records.Accounts;

/// <summary>The accounts in the records database.</summary>
internal sealed class AccountLedger(RecordsDatabase database) : IAccountLedger
{
    public ValueTask<bool> AnyAsync(string site, CancellationToken cancellationToken) =>
        database.ReadAsync(context => context.Accounts.AnyAsync(row => row.Site == site, cancellationToken), cancellationToken);

    public ValueTask<Account?> FindAsync(string site, string name, CancellationToken cancellationToken) =>
        database.ReadAsync(context => AccountRows.FindAsync(context, site, name, cancellationToken), cancellationToken);

    public async ValueTask<IReadOnlyList<Account>> ListAsync(string site, CancellationToken cancellationToken) =>
        await database.ReadAsync(
            async context =>
            {
                List<AccountRow> rows = await AccountRows.Newest(context, site).OrderBy(row => row.Name).ToListAsync(cancellationToken);
                Dictionary<string, long> created = await context.Accounts.Where(row => row.Site == site && row.Revision == 1).ToDictionaryAsync(row => row.Name, row => row.At, cancellationToken);
                Dictionary<string, AccountUseRow> use = await context.AccountUse.Where(row => row.Site == site).ToDictionaryAsync(row => row.Name, cancellationToken);
                return rows.ConvertAll(row => AccountRows.ToAccount(row, created[row.Name], use.GetValueOrDefault(row.Name)));
            },
            cancellationToken);

    public ValueTask<AccountOutcome> AddAsync(string site, Account account, string by, Instant at, bool isFirst, CancellationToken cancellationToken) =>
        database.WriteAsync(
            async context =>
            {
                if (isFirst && await context.Accounts.AnyAsync(row => row.Site == site, cancellationToken))
                {
                    return AccountOutcome.NotTheFirst;
                }

                if (await context.Accounts.AnyAsync(row => row.Site == site && row.Name == account.Name, cancellationToken))
                {
                    return AccountOutcome.NameTaken;
                }

                AccountRow row = AccountRows.ToRow(site, account, 1, by, at);
                context.Accounts.Add(row);
                await AuditChain.CoverAsync(context, row, AccountNotes.Created(site, account, by, at), cancellationToken);
                if (isFirst)
                {
                    await AuditChain.AppendAsync(context, AccountNotes.SetUpDone(site, account.Name, at), cancellationToken);
                }

                return AccountOutcome.Done;
            },
            cancellationToken);

    public ValueTask<AccountOutcome> ChangeAsync(string site, string name, AccountChange change, string by, Instant at, CancellationToken cancellationToken) =>
        database.WriteAsync(
            async context =>
            {
                Account? before = await AccountRows.FindAsync(context, site, name, cancellationToken);
                if (before is null)
                {
                    return AccountOutcome.Unknown;
                }

                Account after = Apply(before, change);
                if (IsAdministrator(before) && !IsAdministrator(after) && !await HasOtherAdministratorAsync(context, site, name, cancellationToken))
                {
                    return AccountOutcome.LastAdministrator;
                }

                await RecordAsync(context, site, before, after, change, by, at, cancellationToken);
                return AccountOutcome.Done;
            },
            cancellationToken);

    public async ValueTask RefusedAsync(string site, IReadOnlyList<SignInRefusals> refusals, Instant at, CancellationToken cancellationToken) =>
        await database.WriteAsync(
            async context =>
            {
                foreach (SignInRefusals refused in refusals)
                {
                    if (refused.Account is { } name)
                    {
                        AccountUseRow use = await AccountRows.UseAsync(context, site, name, cancellationToken);
                        use.Failures = refused.Failures;
                        use.LastFailureAt = refused.To.Microseconds;
                    }

                    if (refused.Count > 0)
                    {
                        await AuditChain.AppendAsync(context, AccountNotes.Refused(site, refused, at), cancellationToken);
                    }
                }

                return 0;
            },
            cancellationToken);

    private static async Task RecordAsync(
        RecordsContext context, string site, Account before, Account after, AccountChange change, string by, Instant at, CancellationToken cancellationToken)
    {
        AccountRow row = AccountRows.ToRow(site, after, before.Revision + 1, by, at);
        AuditNote note = AccountNotes.Changed(site, before, after, change, by, at);
        if (note.Content.Count == 0)
        {
            return;
        }

        context.Accounts.Add(row);
        await AuditChain.CoverAsync(context, row, note, cancellationToken);
        if (change.Password is not null && !change.IsSamePassword)
        {
            AccountUseRow use = await AccountRows.UseAsync(context, site, before.Name, cancellationToken);
            use.Failures = 0;
        }

        if ((change.Password is not null && !change.IsSamePassword) || after.IsDisabled)
        {
            await context.Sessions.Where(session => session.Site == site && session.Account == before.Name).ExecuteDeleteAsync(cancellationToken);
        }
    }

    private static Account Apply(Account account, AccountChange change) => account with
    {
        DisplayName = change.DisplayName ?? account.DisplayName,
        Roles = change.Roles ?? account.Roles,
        IsDisabled = change.IsDisabled ?? account.IsDisabled,
        Password = change.Password ?? account.Password,
        MustChangePassword = change.Password is null || change.IsSamePassword ? account.MustChangePassword : change.MustChangePassword,
    };

    private static bool IsAdministrator(Account account) => !account.IsDisabled && account.Roles.Contains(Role.Administrator);

    private static async Task<bool> HasOtherAdministratorAsync(RecordsContext context, string site, string name, CancellationToken cancellationToken)
    {
        List<string> others = await AccountRows.Newest(context, site).Where(row => row.Name != name && !row.Disabled).Select(row => row.Roles).ToListAsync(cancellationToken);
        return others.Any(roles => RoleWords.Split(roles).Contains(Role.Administrator));
    }
}
