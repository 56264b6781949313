import { signal } from "@preact/signals";
import type { ComponentChildren } from "preact";
import { useEffect } from "preact/hooks";

/** What the page at hand is called, in the window's title. */
export const pageTitle = signal("");

/** The heading of a page: names the window too, and takes the focus when somebody comes from another page. */
export function PageHead({ title, isHidden, children }: { title: string; isHidden?: boolean; children?: ComponentChildren }) {
  useEffect(() => {
    pageTitle.value = title;
  }, [title]);
  return (
    <div class={isHidden === true ? "hidden" : "page-head"}>
      <h1 id="page-title" tabIndex={-1}>
        {title}
      </h1>
      {children}
    </div>
  );
}
