import { entry } from "../access/session";
import { caution, site } from "../state";
import { place } from "./router";

/** The caution where the page itself does not show it, and what the pages are served by. */
export function Footer() {
  const version = site.value?.version ?? entry.value?.version;
  const { page } = place.value;
  const text = caution.value !== "" ? caution.value : entry.value?.caution;
  const isAbove = site.value !== null && (page === "glance" || page === "source");
  return (
    <footer class="foot quiet">
      <p>{isAbove || text === undefined ? "LabWatch is no protective device." : text}</p>
      <p>
        LabWatch {version} · <a href="/openapi/v1.json">Description of the API</a> · <a href="/health/ready">Health</a>
      </p>
    </footer>
  );
}
