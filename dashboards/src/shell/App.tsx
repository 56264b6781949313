import { useEffect, useRef, useState } from "preact/hooks";
import type { Alert } from "../api/types";
import { standing } from "../hazards/board";
import { GlancePage } from "../pages/GlancePage";
import { UnknownPage } from "../pages/UnknownPage";
import { AcknowledgeDialog } from "../parts/AcknowledgeDialog";
import { LostBanner } from "../parts/Banners";
import { HelpDialog } from "../parts/HelpDialog";
import { focusAfter, goTo, listenToKeys } from "../shortcuts";
import { SourcePage } from "../source/SourcePage";
import { announcement, hazards, link, site } from "../state";
import { Header } from "./Header";
import { pageTitle } from "./PageHead";
import { place } from "./router";

/** What every page stands in: header, page, footer, and the dialogs that any page can open. */
export function App() {
  const [acknowledging, setAcknowledging] = useState<Alert[] | null>(null);
  const [helping, setHelping] = useState(false);
  useEffect(() => listenToKeys({ "?": () => setHelping(true) }), []);
  useWindowTitle();
  useArrival();
  return (
    <>
      <a class="skip" href="#page">
        Skip to the page
      </a>
      <Header onHelp={() => setHelping(true)} />
      <div class="hidden" role="status" aria-live="assertive">
        {announcement.value}
      </div>
      <main id="page" tabIndex={-1} class={link.value === "lost" ? "is-old" : ""}>
        <LostBanner />
        {site.value === null ? (
          <p class="panel">{link.value === "connecting" ? "Asking the service…" : "The service does not answer. Trying again by itself."}</p>
        ) : (
          <Page onAcknowledge={setAcknowledging} />
        )}
      </main>
      <footer class="foot quiet">
        LabWatch {site.value?.version} is no protective device. <a href="/openapi/v1.json">Description of the API</a> · <a href="/health/ready">Health</a>
      </footer>
      {acknowledging !== null && (
        <AcknowledgeDialog
          chosen={acknowledging}
          onClose={() => {
            setAcknowledging(null);
            focusAfter(acknowledging);
          }}
        />
      )}
      {helping && <HelpDialog onClose={() => setHelping(false)} />}
    </>
  );
}

function Page({ onAcknowledge }: { onAcknowledge: (alerts: Alert[]) => void }) {
  const { page, id } = place.value;
  switch (page) {
    case "glance":
      return <GlancePage onAcknowledge={onAcknowledge} />;
    case "source":
      return <SourcePage key={id} id={id!} onAcknowledge={onAcknowledge} />;
    default:
      return <UnknownPage />;
  }
}

/** The window's title: standing hazards first, so that a tab in the background says so. */
function useWindowTitle(): void {
  const open = standing(hazards.value).length;
  const parts = [open > 0 ? `(${open}) standing hazard${open === 1 ? "" : "s"}` : "", pageTitle.value, site.value?.name ?? "", "LabWatch"];
  const title = parts.filter((part) => part !== "").join(" – ");
  useEffect(() => {
    document.title = title;
  }, [title]);
}

/** After a change of the page the focus goes to its heading, or to the part that the address names. */
function useArrival(): void {
  const { page, id } = place.value;
  const isFirst = useRef(true);
  useEffect(() => {
    if (isFirst.current) {
      isFirst.current = false;
      return;
    }
    if (location.hash.length > 1) {
      goTo(location.hash.slice(1));
      return;
    }
    window.scrollTo(0, 0);
    document.getElementById("page-title")?.focus({ preventScroll: true });
  }, [page, id]);
}
