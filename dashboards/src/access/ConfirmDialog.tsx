import { useRef, useState } from "preact/hooks";
import { confirmPassword } from "../api/access";
import { Refusal } from "../api/client";
import { span } from "../format/time";
import { Dialog } from "../parts/Dialog";
import { Problems } from "../parts/Problems";
import { PasswordField } from "./PasswordField";
import { confirmed, me } from "./session";

/** Asks for the password again before a change that wants it fresh: a page left open must not be enough. */
export function ConfirmDialog() {
  const [password, setPassword] = useState("");
  const [problems, setProblems] = useState<string[]>([]);
  const [isSending, setSending] = useState(false);
  const form = useRef<HTMLFormElement>(null);
  const send = async (): Promise<void> => {
    setSending(true);
    setProblems([]);
    try {
      await confirmPassword(password);
      confirmed("again");
    } catch (failure) {
      setProblems(problemsOf(failure));
      setSending(false);
      form.current?.querySelector<HTMLInputElement>("input[name=password]")?.select();
    }
  };
  return (
    <Dialog title="Your password, please" onClose={() => confirmed("leave")}>
      <p>You entered it too long ago for this change. It is sent as soon as the password is right; nothing that you typed is lost.</p>
      <form
        ref={form}
        class="stack"
        onSubmit={(event) => {
          event.preventDefault();
          void send();
        }}
      >
        <input class="hidden" type="text" name="username" autocomplete="username" value={me.value?.name ?? ""} readOnly tabIndex={-1} aria-hidden="true" />
        <PasswordField label="Password" name="password" autocomplete="current-password" value={password} onInput={setPassword} hasFocus />
        <Problems sentences={problems} />
        <div class="buttons">
          <button type="submit" class="act" disabled={isSending}>
            {isSending ? "Checking…" : "Go on"}
          </button>
          <button type="button" onClick={() => confirmed("leave")}>
            Cancel
          </button>
        </div>
      </form>
    </Dialog>
  );
}

function problemsOf(failure: unknown): string[] {
  if (!(failure instanceof Refusal)) {
    return ["That failed."];
  }
  return failure.status === 401
    ? ["The password is wrong."]
    : failure.status === 429
      ? [`Too many wrong passwords. Try again in ${span((failure.retryAfterSeconds ?? 30) * 1000)}.`]
      : failure.sentences;
}
