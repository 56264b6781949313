import type { ComponentChildren } from "preact";
import { useState } from "preact/hooks";

interface PasswordFieldProps {
  label: string;
  name: string;
  /** What a password manager may do with it: fill in the one that is kept, or offer a new one. */
  autocomplete: "current-password" | "new-password";
  value: string;
  onInput: (value: string) => void;
  describedBy?: string;
  minLength?: number;
  hasFocus?: boolean;
  children?: ComponentChildren;
}

/** A password that can be looked at, with a word where Caps Lock is on. */
export function PasswordField({ label, name, autocomplete, value, onInput, describedBy, minLength, hasFocus, children }: PasswordFieldProps) {
  const [isShown, setShown] = useState(false);
  const [isCapsLock, setCapsLock] = useState(false);
  const look = (event: KeyboardEvent): void => {
    // Password managers send keys that are none.
    if (typeof event.getModifierState === "function") {
      setCapsLock(event.getModifierState("CapsLock"));
    }
  };
  const hint = `${name}-hint`;
  return (
    <div class="field">
      <label for={name}>{label}</label>
      <div class="with-button">
        <input
          id={name}
          name={name}
          type={isShown ? "text" : "password"}
          autocomplete={autocomplete}
          autocapitalize="off"
          spellcheck={false}
          required
          maxLength={512}
          minLength={minLength}
          autofocus={hasFocus === true}
          aria-describedby={`${hint} ${describedBy ?? ""}`.trim()}
          value={value}
          onInput={(event) => onInput(event.currentTarget.value)}
          onKeyDown={look}
          onKeyUp={look}
          onBlur={() => setCapsLock(false)}
        />
        <button type="button" aria-pressed={isShown} aria-label={`Show ${label.toLowerCase()}`} onClick={() => setShown(!isShown)}>
          {isShown ? "Hide" : "Show"}
        </button>
      </div>
      <p id={hint} class="hint abnormal" role="status">
        {isCapsLock && "Caps Lock is on."}
      </p>
      {children}
    </div>
  );
}
