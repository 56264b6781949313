import type { ComponentChildren } from "preact";
import { useState } from "preact/hooks";

interface FoldProps { opensByItself: boolean; summary: ComponentChildren; class?: string; children: ComponentChildren }

/** Something that is open by itself or not until a person has said otherwise; from then on it stays as they left it. */
export function Fold({ opensByItself, summary, children, ...rest }: FoldProps) {
  const [chosen, setChosen] = useState<boolean | null>(null);
  const isOpen = chosen ?? opensByItself;
  return (
    <details
      class={rest.class}
      open={isOpen}
      onToggle={(event) => {
        if (event.currentTarget.open !== isOpen) {
          setChosen(event.currentTarget.open);
        }
      }}
    >
      <summary>{summary}</summary>
      {children}
    </details>
  );
}
