import { useEffect, useState } from "preact/hooks";
import { PageHead } from "../shell/PageHead";
import { go, place } from "../shell/router";
import { credentialsIn, destination, type Credentials } from "./arrival";
import { access, entry, me, welcome } from "./session";
import { SignInForm } from "./SignInForm";

/** Signing in, and on to the page that was asked for. */
export function SignInPage() {
  const given = useGiven();
  const other = access.value === "signed-in" ? me.value : null;
  const facts = entry.value;
  return (
    <div class="narrow">
      <PageHead title="Sign in" />
      <div class="panel">
        {other !== null && (
          <p>
            You are signed in as <strong>{other.displayName}</strong>. Signing in below changes that. <a href="/">Stay</a>
          </p>
        )}
        {place.value.query.has("to") && other === null && <p>Sign in to see the page that you asked for.</p>}
        <SignInForm
          key={JSON.stringify(given)}
          given={given}
          sendsAtOnce={given?.name !== undefined && given.code !== undefined && other === null}
          onSignedIn={(person, typed) => {
            const asked = place.value.query.get("to");
            welcome(person, typed);
            go(destination(asked, location.origin), "replace");
          }}
        />
        <p class="quiet">
          No account, or the password forgotten? An administrator of {facts?.siteName ?? "this laboratory"} makes accounts and one-time passwords.
        </p>
        {facts?.isDemo === true && <p class="quiet">Demo: names and passwords stand where the service was started.</p>}
      </div>
    </div>
  );
}

/** What a one-time link carried; a second link may come into the same window. */
function useGiven(): Credentials | null {
  const [given, setGiven] = useState(() => credentialsIn(location.hash));
  useEffect(() => {
    const take = (): void => {
      const found = credentialsIn(location.hash);
      if (found !== null) {
        setGiven(found);
        // A code must not stay in the address bar, nor in the history.
        history.replaceState(null, "", location.pathname + location.search);
      }
    };
    take();
    window.addEventListener("hashchange", take);
    return () => window.removeEventListener("hashchange", take);
  }, []);
  return given;
}
