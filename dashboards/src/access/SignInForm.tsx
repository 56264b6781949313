import { useEffect, useRef, useState } from "preact/hooks";
import { signIn, type Me } from "../api/access";
import { Refusal } from "../api/client";
import { Problems } from "../parts/Problems";
import { span } from "../format/time";
import type { Credentials } from "./arrival";
import { PasswordField } from "./PasswordField";
import { useWait } from "./throttle";

interface SignInFormProps { given: Credentials | null; sendsAtOnce?: boolean; onSignedIn: (person: Me, password: string) => void }

/** Name and password. */
export function SignInForm({ given, sendsAtOnce, onSignedIn }: SignInFormProps) {
  const [name, setName] = useState(given?.name ?? "");
  const [password, setPassword] = useState(given?.code ?? "");
  const [problem, setProblem] = useState<string | null>(null);
  const [isSending, setSending] = useState(false);
  const [left, wait] = useWait();
  const form = useRef<HTMLFormElement>(null);

  const send = async (): Promise<void> => {
    // From the form itself: a browser that fills in a field does not always say so.
    const fields = new FormData(form.current!);
    setSending(true);
    setProblem(null);
    try {
      const typed = String(fields.get("password"));
      onSignedIn(await signIn(String(fields.get("username")).trim(), typed), typed);
    } catch (failure) {
      setProblem(problemOf(failure));
      if (failure instanceof Refusal && failure.status === 429) {
        wait(failure.retryAfterSeconds ?? 30);
      }
      setSending(false);
      form.current?.querySelector<HTMLInputElement>("[name=password]")?.select();
    }
  };
  useEffect(() => {
    if (sendsAtOnce === true) {
      void send();
    }
  }, []);

  return (
    <form
      ref={form}
      class="stack"
      onSubmit={(event) => {
        event.preventDefault();
        void send();
      }}
    >
      <label>
        Name
        <input
          type="text"
          name="username"
          autocomplete="username"
          autocapitalize="off"
          spellcheck={false}
          required
          maxLength={63}
          autofocus={given?.name === undefined}
          value={name}
          onInput={(event) => setName(event.currentTarget.value)}
        />
      </label>
      <PasswordField label="Password" name="password" autocomplete="current-password" value={password} onInput={setPassword} hasFocus={given?.name !== undefined} />
      <Problems sentences={problem === null ? [] : [problem]} />
      {left > 0 && <p>Possible again in {span(left * 1000)}.</p>}
      <div class="buttons">
        <button type="submit" class="act" disabled={isSending || left > 0}>
          {isSending ? "Signing in…" : "Sign in"}
        </button>
      </div>
    </form>
  );
}

function problemOf(failure: unknown): string {
  if (!(failure instanceof Refusal)) {
    return "Signing in failed.";
  }
  switch (failure.status) {
    case 0:
      return "The service does not answer. It may be starting; try again in a moment.";
    case 401:
      return "Name and password do not belong together, or the account is disabled. Check Caps Lock; an administrator can give you a new password.";
    case 429:
      return "Too many tries with a wrong password. Signing in with this name has to wait.";
    default:
      return failure.sentences.join(" ");
  }
}
