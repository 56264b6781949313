import type { Permission } from "../api/access";
import { can, me } from "../access/session";
import { standing } from "../hazards/board";
import { Icon } from "../parts/Icon";
import { hazards } from "../state";
import { place } from "./router";
import { patterns } from "./routes";

const entries = [
  { page: "glance", text: "Sources", needs: "read" },
  { page: "trail", text: "Trail", needs: "read-trail" },
  { page: "people", text: "People", needs: "manage-accounts" },
] as const satisfies { page: keyof typeof patterns; text: string; needs: Permission }[];

/** The pages that the person may open, with a mark where a hazard stands. */
export function Navigation() {
  const here = place.value.page;
  if (!can("read") || me.value?.mustChangePassword === true) {
    return null;
  }
  const count = standing(hazards.value).length;
  return (
    <nav class="pages" aria-label="Pages">
      <ul>
        {entries
          .filter(({ needs }) => can(needs))
          .map(({ page, text }) => (
            <li key={page}>
              <a href={patterns[page]} aria-current={here === page ? "page" : here === "source" && page === "glance" ? "true" : undefined}>
                {text}
                {page === "glance" && count > 0 && here !== "glance" && (
                  <span class="mark hazard">
                    <Icon name="hazard" size={17} /> {count}
                    <span class="hidden"> standing hazard{count === 1 ? "" : "s"}</span>
                  </span>
                )}
              </a>
            </li>
          ))}
      </ul>
    </nav>
  );
}
