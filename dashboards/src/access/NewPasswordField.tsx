import { leastCharacters, lengthText } from "./passwords";
import { PasswordField } from "./PasswordField";

interface NewPasswordFieldProps { label: string; name: string; value: string; onInput: (value: string) => void; hasFocus?: boolean }

/** A password to choose: what is asked of it stands above it, before anything is typed. */
export function NewPasswordField({ label, name, value, onInput, ...rest }: NewPasswordFieldProps) {
  return (
    <>
      <div id={`${name}-rules`} class="rules">
        <p>
          <strong>At least {leastCharacters} characters</strong>, and nothing else: no rule about digits, capitals or signs.
        </p>
        <p class="quiet">
          A few words that do not belong together are easy to keep in mind; blanks count. Well-known passwords, rows of keys, and words from your name or this laboratory’s are refused. It does not expire.
        </p>
      </div>
      <PasswordField label={label} name={name} autocomplete="new-password" value={value} onInput={onInput} describedBy={`${name}-rules ${name}-length`} {...rest}>
        <p id={`${name}-length`} class="quiet hint">
          {lengthText(value)}
        </p>
      </PasswordField>
    </>
  );
}
