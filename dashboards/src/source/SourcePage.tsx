import type { Alert } from "../api/types";
import { shortName } from "../hazards/board";
import { SourcePanel } from "../parts/SourcePanel";
import { PageHead } from "../shell/PageHead";
import { caution, sources } from "../state";

interface SourcePageProps { id: string; onAcknowledge: (alerts: Alert[]) => void }

/** One source. */
export function SourcePage({ id }: SourcePageProps) {
  const source = sources.value.find((candidate) => candidate.id === id);
  if (source === undefined) {
    return (
      <>
        <PageHead title="There is no such source" />
        <p class="panel">
          The lab file in force names no source <code>{id}</code>. <a href="/">All sources</a>
        </p>
      </>
    );
  }
  return (
    <>
      <PageHead title={shortName(source.name)} />
      <SourcePanel source={source} />
      <p class="caution">{caution.value}</p>
    </>
  );
}
