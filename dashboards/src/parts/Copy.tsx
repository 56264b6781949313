import { useRef, useState } from "preact/hooks";

/** Something to copy exactly, in monospace, with a button; without the clipboard (plain http) it is selected instead. */
export function Copy({ text, label, isBlock }: { text: string; label: string; isBlock?: boolean }) {
  const [said, setSaid] = useState("");
  const code = useRef<HTMLElement>(null);
  const copy = async (): Promise<void> => {
    try {
      await navigator.clipboard.writeText(text);
      setSaid("Copied.");
    } catch {
      getSelection()?.selectAllChildren(code.current!);
      setSaid("Selected: copy it with the keyboard.");
    }
  };
  return (
    <span class={isBlock === true ? "copy block" : "copy"}>
      <code ref={code}>{text}</code>
      <button type="button" aria-label={`Copy ${label}`} onClick={() => void copy()}>
        Copy
      </button>
      <span role="status" class="quiet">
        {said}
      </span>
    </span>
  );
}
