import type { ComponentChildren } from "preact";
import { useEffect, useId, useRef } from "preact/hooks";

/** A modal dialog: the browser keeps the focus inside and gives it back afterwards. */
export function Dialog({ title, onClose, children }: { title: string; onClose: () => void; children: ComponentChildren }) {
  const titleId = useId();
  const dialog = useRef<HTMLDialogElement>(null);
  const close = useRef(onClose);
  close.current = onClose;
  useEffect(() => {
    const element = dialog.current!;
    const onEscape = (): void => close.current();
    element.showModal();
    // The first field can lie far below: a dialog that asks for nothing starts at its title.
    if (element.querySelector("[autofocus]") === null) {
      element.querySelector("h2")?.focus();
    }
    element.addEventListener("close", onEscape);
    return () => {
      // A dialog that is only taken off the page does not give the focus back.
      element.removeEventListener("close", onEscape);
      element.close();
    };
  }, []);
  return (
    <dialog ref={dialog} aria-labelledby={titleId}>
      <h2 id={titleId} tabIndex={-1}>{title}</h2>
      {children}
    </dialog>
  );
}
