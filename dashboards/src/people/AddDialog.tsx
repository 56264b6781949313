import { useState } from "preact/hooks";
import { addAccount, type AccountChange, type Role } from "../api/access";
import { sentencesOf } from "../api/client";
import { accountName } from "../access/arrival";
import { Dialog } from "../parts/Dialog";
import { Problems } from "../parts/Problems";
import { RoleChoice } from "../access/RoleChoice";

/** A new account: it starts with a one-time password. */
export function AddDialog({ onAdded, onClose }: { onAdded: (change: AccountChange) => void; onClose: () => void }) {
  const [displayName, setDisplayName] = useState("");
  const [name, setName] = useState<string | null>(null);
  const [roles, setRoles] = useState<Role[]>([]);
  const [problems, setProblems] = useState<string[]>([]);
  const [isSending, setSending] = useState(false);
  const chosenName = name ?? accountName(displayName);
  const send = async (): Promise<void> => {
    if (roles.length === 0) {
      setProblems(["Choose at least one role."]);
      return;
    }
    setSending(true);
    setProblems([]);
    try {
      onAdded(await addAccount(chosenName, displayName.trim(), roles));
    } catch (failure) {
      setProblems(sentencesOf(failure, "The account was not made."));
      setSending(false);
    }
  };
  return (
    <Dialog title="Add a person" onClose={onClose}>
      <form
        class="stack"
        onSubmit={(event) => {
          event.preventDefault();
          void send();
        }}
      >
        <label>
          Name
          <input type="text" name="display-name" autocomplete="off" required maxLength={80} autofocus value={displayName} onInput={(event) => setDisplayName(event.currentTarget.value)} />
          <span class="quiet">As it shall stand on records.</span>
        </label>
        <label>
          Name to sign in with
          <input type="text" name="account-name" autocomplete="off" autocapitalize="off" spellcheck={false} required maxLength={63} pattern="[a-z0-9][a-z0-9\-]{0,62}" title="Small letters, digits and hyphens" value={chosenName} onInput={(event) => setName(event.currentTarget.value)} />
          <span class="quiet">Small letters, digits and hyphens. It stays with this person for ever.</span>
        </label>
        <RoleChoice chosen={roles} onChange={setRoles} />
        <Problems sentences={problems} />
        <div class="buttons">
          <button type="submit" class="act" disabled={isSending}>
            {isSending ? "Adding…" : "Add"}
          </button>
          <button type="button" onClick={onClose}>
            Cancel
          </button>
        </div>
      </form>
    </Dialog>
  );
}
