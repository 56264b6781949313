import { useEffect, useState } from "preact/hooks";
import { setUp } from "../api/access";
import { sentencesOf } from "../api/client";
import { Problems } from "../parts/Problems";
import { PageHead } from "../shell/PageHead";
import { go } from "../shell/router";
import { accountName, credentialsIn } from "./arrival";
import { NewPasswordField } from "./NewPasswordField";
import { entry, welcome } from "./session";

/** First start: whoever can read the service's own output or its data directory becomes the first administrator. */
export function SetUpPage() {
  const [given] = useState(() => credentialsIn(location.hash));
  const [code, setCode] = useState(given?.code ?? "");
  const [displayName, setDisplayName] = useState("");
  const [name, setName] = useState<string | null>(null);
  const [password, setPassword] = useState("");
  const [problems, setProblems] = useState<string[]>([]);
  const [isSending, setSending] = useState(false);
  useEffect(() => {
    if (given !== null) {
      history.replaceState(null, "", location.pathname);
    }
  }, []);
  if (entry.value?.setUpNeeded === false) {
    return (
      <div class="narrow">
        <PageHead title="Set up" />
        <p class="panel">
          This service has its first administrator already. <a href="/sign-in">Sign in</a>
        </p>
      </div>
    );
  }

  const chosenName = name ?? accountName(displayName);
  const send = async (): Promise<void> => {
    setSending(true);
    setProblems([]);
    try {
      welcome(await setUp(code.trim(), chosenName, displayName.trim(), password));
      go("/people", "replace");
    } catch (failure) {
      setProblems(sentencesOf(failure, "The set-up failed."));
      setSending(false);
    }
  };
  return (
    <div class="narrow">
      <PageHead title="Set up: the first administrator" />
      <form
        class="panel stack"
        onSubmit={(event) => {
          event.preventDefault();
          void send();
        }}
      >
        <p>
          Nobody can sign in at {entry.value?.siteName ?? "this service"} yet. An administrator makes the accounts of all others, and can do nothing with sources, limits or alerts.
        </p>
        <label>
          Set-up code
          <input type="text" name="code" autocomplete="one-time-code" autocapitalize="off" spellcheck={false} required autofocus={code === ""} value={code} onInput={(event) => setCode(event.currentTarget.value)} />
          <span class="quiet">The service printed it when it started; it is also in the file set-up-code in its data directory.</span>
        </label>
        <label>
          Your name
          <input type="text" name="name" autocomplete="name" required maxLength={80} autofocus={code !== ""} value={displayName} onInput={(event) => setDisplayName(event.currentTarget.value)} />
          <span class="quiet">As it shall stand on records.</span>
        </label>
        <label>
          Name to sign in with
          <input type="text" name="username" autocomplete="username" autocapitalize="off" spellcheck={false} required maxLength={63} pattern="[a-z0-9][a-z0-9\-]{0,62}" value={chosenName} onInput={(event) => setName(event.currentTarget.value)} />
          <span class="quiet">Small letters, digits and hyphens. It can never be given to somebody else.</span>
        </label>
        <NewPasswordField label="Password" name="new-password" value={password} onInput={setPassword} />
        <Problems sentences={problems} />
        <div class="buttons">
          <button type="submit" class="act" disabled={isSending}>
            {isSending ? "Setting up…" : "Make me the first administrator"}
          </button>
        </div>
      </form>
    </div>
  );
}
