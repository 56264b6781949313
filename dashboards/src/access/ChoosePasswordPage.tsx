import { PageHead } from "../shell/PageHead";
import { announcement } from "../state";
import { ChangePasswordForm } from "./ChangePasswordForm";
import { me, oneTimePassword } from "./session";

/** After signing in with a one-time password: nothing else until there is one that only its owner knows. */
export function ChoosePasswordPage() {
  return (
    <div class="narrow">
      <PageHead title="Choose your password" />
      <div class="panel">
        <p>
          Welcome, {me.value?.displayName}. You signed in with a password that somebody else has seen. Choose one that only you know; everything else waits for it.
        </p>
        <ChangePasswordForm currentLabel="One-time password" known={oneTimePassword.value} onChanged={() => (announcement.value = "The password is changed.")} />
      </div>
    </div>
  );
}
