import { place } from "./router";
import { patterns, type Page } from "./routes";

const entries: { page: Exclude<Page, "unknown" | "source">; text: string }[] = [{ page: "glance", text: "Sources" }];

/** The pages that the person may open. */
export function Navigation() {
  const here = place.value.page;
  return (
    <nav class="pages" aria-label="Pages">
      <ul>
        {entries.map(({ page, text }) => (
          <li key={page}>
            <a href={patterns[page]} aria-current={here === page ? "page" : undefined}>
              {text}
            </a>
          </li>
        ))}
      </ul>
    </nav>
  );
}
