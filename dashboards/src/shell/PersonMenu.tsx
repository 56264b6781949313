import { useEffect, useRef, useState } from "preact/hooks";
import { sentencesOf } from "../api/client";
import { rolesText } from "../access/roles";
import { endSession, me } from "../access/session";
import { go, place } from "./router";
import { patterns } from "./routes";

/** Who is signed in, with the way to the own page and out. */
export function PersonMenu() {
  const [isOpen, setOpen] = useState(false);
  const [problem, setProblem] = useState<string | null>(null);
  const whole = useRef<HTMLDivElement>(null);
  const button = useRef<HTMLButtonElement>(null);
  const { path } = place.value;
  useEffect(() => setOpen(false), [path]);
  useEffect(() => {
    if (!isOpen) {
      return;
    }
    const onPointer = (event: Event): void => {
      if (whole.current?.contains(event.target as Node) !== true) {
        setOpen(false);
      }
    };
    const onKey = (event: KeyboardEvent): void => {
      if (event.key === "Escape") {
        setOpen(false);
        button.current?.focus();
      }
    };
    document.addEventListener("pointerdown", onPointer);
    document.addEventListener("focusin", onPointer);
    document.addEventListener("keydown", onKey);
    return () => {
      document.removeEventListener("pointerdown", onPointer);
      document.removeEventListener("focusin", onPointer);
      document.removeEventListener("keydown", onKey);
    };
  }, [isOpen]);
  const leave = async (): Promise<void> => {
    try {
      await endSession();
      setOpen(false);
      // The next person starts at the beginning.
      go(patterns["sign-in"], "replace");
    } catch (failure) {
      setProblem(sentencesOf(failure, "Signing out failed.").join(" "));
    }
  };
  const person = me.value;
  if (person === null) {
    return null;
  }
  return (
    <div class="person" ref={whole}>
      <button ref={button} type="button" aria-expanded={isOpen} aria-controls="person-menu" onClick={() => setOpen(!isOpen)}>
        <span class="hidden">Signed in as </span>
        <span class="person-name">{person.displayName}</span>
        <span aria-hidden="true"> ▾</span>
      </button>
      <div id="person-menu" class="menu" hidden={!isOpen}>
        <p class="quiet">
          {rolesText(person.roles)}
          <br />
          <code>{person.name}</code>
        </p>
        <a href={patterns.me}>Password, sessions and tokens</a>
        <button type="button" onClick={() => void leave()}>
          Sign out
        </button>
        <p role="alert" class="abnormal">
          {problem}
        </p>
      </div>
    </div>
  );
}
