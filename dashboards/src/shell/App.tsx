import { useEffect, useState } from "preact/hooks";
import { ChoosePasswordPage } from "../access/ChoosePasswordPage";
import { ConfirmDialog } from "../access/ConfirmDialog";
import { access, confirming, me } from "../access/session";
import { SetUpPage } from "../access/SetUpPage";
import { SignInAgain } from "../access/SignInAgain";
import { SignInPage } from "../access/SignInPage";
import type { Alert } from "../api/types";
import { MePage } from "../me/MePage";
import { GlancePage } from "../pages/GlancePage";
import { UnknownPage } from "../pages/UnknownPage";
import { AcknowledgeDialog } from "../parts/AcknowledgeDialog";
import { LostBanner } from "../parts/Banners";
import { HelpDialog } from "../parts/HelpDialog";
import { PeoplePage } from "../people/PeoplePage";
import { focusAfter, listenToKeys } from "../shortcuts";
import { SourcePage } from "../source/SourcePage";
import { announcement, link, site } from "../state";
import { TrailPage } from "../trail/TrailPage";
import { useArrival, useWindowTitle } from "./arrival";
import { useFollowedLink } from "./followed";
import { Footer } from "./Footer";
import { Header } from "./Header";
import { go, place } from "./router";
import { patterns } from "./routes";

/** What every page stands in: header, page, footer, and the dialogs that any page can open. */
export function App() {
  const [acknowledging, setAcknowledging] = useState<Alert[] | null>(null);
  const [helping, setHelping] = useState(false);
  useEffect(() => listenToKeys({ "?": () => setHelping(true), o: () => go(patterns.glance), t: () => go(patterns.trail), m: () => go(patterns.me) }), []);
  useWindowTitle();
  useArrival();
  useFollowedLink(setAcknowledging);
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
        <Page onAcknowledge={setAcknowledging} />
      </main>
      <Footer />
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
      {access.value === "ended" ? <SignInAgain /> : confirming.value && <ConfirmDialog />}
    </>
  );
}

function Page({ onAcknowledge }: { onAcknowledge: (alerts: Alert[]) => void }) {
  const { page, id } = place.value;
  if (access.value === "asking" || access.value === "away") {
    return <p class="panel">{access.value === "asking" ? "Asking the service…" : "The service does not answer. Trying again by itself."}</p>;
  }
  if (page === "sign-in") {
    return <SignInPage />;
  }
  if (page === "set-up") {
    return <SetUpPage />;
  }
  if (me.value?.mustChangePassword === true) {
    return <ChoosePasswordPage />;
  }
  if (site.value === null) {
    return <p class="panel">Asking the service…</p>;
  }
  switch (page) {
    case "glance":
      return <GlancePage onAcknowledge={onAcknowledge} />;
    case "source":
      return <SourcePage key={id} id={id!} onAcknowledge={onAcknowledge} />;
    case "trail":
      return <TrailPage />;
    case "people":
      return <PeoplePage />;
    case "me":
      return <MePage />;
    default:
      return <UnknownPage />;
  }
}
