import { Dialog } from "../parts/Dialog";
import { me, leave, welcome } from "./session";
import { SignInForm } from "./SignInForm";

/** Above a page whose session has ended: what was typed below is still there, and goes on after signing in. */
export function SignInAgain() {
  return (
    <Dialog title="Your session has ended" onClose={leave}>
      <p>Sign in again to go on where you were: what you typed is still there. What the page shows is old until then.</p>
      <SignInForm given={me.value === null ? null : { name: me.value.name }} onSignedIn={welcome} />
      <div class="buttons">
        <button type="button" onClick={leave}>
          Leave this page
        </button>
      </div>
    </Dialog>
  );
}
