import { useState } from "preact/hooks";
import { changeAccount, type Account, type AccountChange } from "../api/access";
import { sentencesOf } from "../api/client";
import { me } from "../access/session";
import { Dialog } from "../parts/Dialog";
import { Problems } from "../parts/Problems";
import { RoleChoice } from "../access/RoleChoice";

interface ChangeDialogProps { account: Account; onChanged: (change: AccountChange) => void; onClose: () => void }

/** Name, roles, a new one-time password, and whether the account may be used at all. */
export function ChangeDialog({ account, onChanged, onClose }: ChangeDialogProps) {
  const [displayName, setDisplayName] = useState(account.displayName);
  const [roles, setRoles] = useState(account.roles);
  const [problems, setProblems] = useState<string[]>([]);
  const [isSending, setSending] = useState(false);
  const isOwn = me.value?.name === account.name;
  const send = async (change: Parameters<typeof changeAccount>[1]): Promise<void> => {
    setSending(true);
    setProblems([]);
    try {
      onChanged(await changeAccount(account.name, change));
    } catch (failure) {
      setProblems(sentencesOf(failure, "The account was not changed."));
      setSending(false);
    }
  };
  return (
    <Dialog title={`Change ${account.displayName}`} onClose={onClose}>
      <form
        class="stack"
        onSubmit={(event) => {
          event.preventDefault();
          void send({ displayName: displayName.trim(), roles });
        }}
      >
        <p class="quiet">
          Signs in as <code>{account.name}</code>. What this person has done stays on record under this name.
        </p>
        <label>
          Name
          <input type="text" name="display-name" autocomplete="off" required maxLength={80} value={displayName} onInput={(event) => setDisplayName(event.currentTarget.value)} />
        </label>
        <RoleChoice chosen={roles} onChange={setRoles} />
        <Problems sentences={problems} />
        <div class="buttons">
          <button type="submit" class="act" disabled={isSending}>
            Save
          </button>
          <button type="button" onClick={onClose}>
            Cancel
          </button>
        </div>
      </form>
      {isOwn ? (
        <p class="quiet">This is your own account: its password is changed on your own page, and another administrator disables it.</p>
      ) : (
        <>
          <h3>Password forgotten</h3>
          <p>A one-time password takes the place of the present one and ends every session of this person. They choose their own when they sign in.</p>
          <button type="button" disabled={isSending} onClick={() => void send({ resetPassword: true })}>
            Make a one-time password
          </button>
          <h3>{account.disabled ? "Disabled" : "Left the laboratory"}</h3>
          <p>{account.disabled ? "Nobody can sign in with this account." : "Nobody can sign in with a disabled account; its sessions and tokens end at once. Nothing is deleted."}</p>
          <button type="button" disabled={isSending} onClick={() => void send({ disabled: !account.disabled })}>
            {account.disabled ? "Enable again" : "Disable the account"}
          </button>
        </>
      )}
    </Dialog>
  );
}
