import { useState } from "preact/hooks";
import { changePassword } from "../api/access";
import { sentencesOf } from "../api/client";
import { Problems } from "../parts/Problems";
import { NewPasswordField } from "./NewPasswordField";
import { PasswordField } from "./PasswordField";
import { me, refreshMe } from "./session";

interface ChangePasswordFormProps { currentLabel: string; known?: string | null; onChanged: () => void }

/** The present password, where it is not known from a moment ago, and a new one. */
export function ChangePasswordForm({ currentLabel, known, onChanged }: ChangePasswordFormProps) {
  const [current, setCurrent] = useState(known ?? "");
  const [next, setNext] = useState("");
  const [problems, setProblems] = useState<string[]>([]);
  const [isSending, setSending] = useState(false);
  const send = async (): Promise<void> => {
    setSending(true);
    setProblems([]);
    try {
      await changePassword(current, next);
      setCurrent("");
      setNext("");
      onChanged();
      await refreshMe();
    } catch (failure) {
      setProblems(sentencesOf(failure, "The password was not changed."));
    }
    setSending(false);
  };
  return (
    <form
      class="stack"
      onSubmit={(event) => {
        event.preventDefault();
        void send();
      }}
    >
      <input class="hidden" type="text" name="username" autocomplete="username" value={me.value?.name ?? ""} readOnly tabIndex={-1} aria-hidden="true" />
      {(known ?? null) === null && <PasswordField label={currentLabel} name="current-password" autocomplete="current-password" value={current} onInput={setCurrent} />}
      <NewPasswordField label="New password" name="new-password" value={next} onInput={setNext} />
      <Problems sentences={problems} />
      <div class="buttons">
        <button type="submit" class="act" disabled={isSending}>
          {isSending ? "Changing…" : "Change the password"}
        </button>
      </div>
    </form>
  );
}
