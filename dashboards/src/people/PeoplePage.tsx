import { useEffect, useState } from "preact/hooks";
import { listAccounts, type Account, type AccountChange } from "../api/access";
import { sentencesOf } from "../api/client";
import { roleMeaning, roleWord, rolesText, whoMay, allRoles } from "../access/roles";
import { can, me, refreshMe } from "../access/session";
import { clockTime } from "../format/time";
import { Problems } from "../parts/Problems";
import { PageHead } from "../shell/PageHead";
import { announcement, now, site } from "../state";
import { AddDialog } from "./AddDialog";
import { ChangeDialog } from "./ChangeDialog";
import { OneTimePassword } from "./OneTimePassword";

/** Who may sign in, and as what. */
export function PeoplePage() {
  const [accounts, setAccounts] = useState<Account[] | null>(null);
  const [problems, setProblems] = useState<string[]>([]);
  const [dialog, setDialog] = useState<"add" | Account | null>(null);
  const [secret, setSecret] = useState<{ account: Account; password: string } | null>(null);
  const isAllowed = can("manage-accounts");
  const read = async (): Promise<void> => {
    try {
      setAccounts((await listAccounts()).items);
      setProblems([]);
    } catch (failure) {
      setProblems(sentencesOf(failure, "The accounts could not be read."));
    }
  };
  useEffect(() => {
    if (isAllowed) {
      void read();
    }
  }, [isAllowed]);
  const changed = async ({ account, oneTimePassword }: AccountChange): Promise<void> => {
    setDialog(null);
    announcement.value = `${account.displayName}: saved.`;
    if (oneTimePassword !== null) {
      setSecret({ account, password: oneTimePassword });
    }
    await read();
    if (account.name === me.value?.name) {
      await refreshMe();
    }
  };
  return (
    <>
      <PageHead title="People">
        {isAllowed && (
          <button type="button" class="act" onClick={() => setDialog("add")}>
            Add a person
          </button>
        )}
      </PageHead>
      {!isAllowed && <p class="panel">Only {whoMay("manage-accounts")} looks after accounts.</p>}
      <Problems sentences={problems} />
      {isAllowed && accounts === null && problems.length === 0 && <p class="panel">Reading the accounts…</p>}
      {accounts !== null && <People accounts={accounts} onChange={setDialog} />}
      <section class="panel" aria-labelledby="roles-title">
        <h2 id="roles-title">What each role may do</h2>
        <dl class="terms">
          {allRoles.map((role) => (
            <div key={role}>
              <dt>{roleWord[role]}</dt>
              <dd>{roleMeaning[role]}</dd>
            </div>
          ))}
        </dl>
      </section>
      {dialog === "add" && <AddDialog onAdded={(change) => void changed(change)} onClose={() => setDialog(null)} />}
      {dialog !== null && dialog !== "add" && <ChangeDialog account={dialog} onChanged={(change) => void changed(change)} onClose={() => setDialog(null)} />}
      {secret !== null && <OneTimePassword {...secret} onClose={() => setSecret(null)} />}
    </>
  );
}

function People({ accounts, onChange }: { accounts: Account[]; onChange: (account: Account) => void }) {
  const zone = site.value?.timeZone ?? "UTC";
  return (
    <ul class="rows">
      {accounts.map((account) => (
        <li key={account.name} class={account.disabled ? "row disabled" : "row"}>
          <div>
            <p>
              <strong>{account.displayName}</strong> <code>{account.name}</code>
              {account.name === me.value?.name && <span class="tag">you</span>}
              {account.disabled && <span class="tag">disabled</span>}
              {account.mustChangePassword && !account.disabled && <span class="tag">one-time password</span>}
            </p>
            <p>{rolesText(account.roles)}</p>
          </div>
          <p class="quiet">
            {account.lastSignInAt === null ? "Has never signed in" : `Signed in ${clockTime(account.lastSignInAt, zone, now.value)}`}
            <br />
            Since {clockTime(account.createdAt, zone, now.value)}
          </p>
          <button type="button" onClick={() => onChange(account)}>
            Change<span class="hidden"> {account.displayName}</span>
          </button>
        </li>
      ))}
    </ul>
  );
}
