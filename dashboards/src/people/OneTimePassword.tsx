import type { Account } from "../api/access";
import { Copy } from "../parts/Copy";
import { Dialog } from "../parts/Dialog";

interface OneTimePasswordProps { account: Account; password: string; onClose: () => void }

/** A one-time password, the one time that it is seen. */
export function OneTimePassword({ account, password, onClose }: OneTimePasswordProps) {
  const link = `${location.origin}/sign-in#${new URLSearchParams({ name: account.name, code: password })}`;
  return (
    <Dialog title={`One-time password for ${account.displayName}`} onClose={onClose}>
      <p>
        It is <strong>shown this once</strong>. Hand it over in person, not by mail: whoever has it can sign in as <code>{account.name}</code> until the first sign-in, which asks for a new password.
      </p>
      <Copy text={password} label="the one-time password" isBlock />
      <details>
        <summary>As a link that signs in</summary>
        <Copy text={link} label="the link" isBlock />
      </details>
      <div class="buttons">
        <button type="button" class="act" onClick={onClose}>
          Handed over
        </button>
      </div>
    </Dialog>
  );
}
