import type { Source } from "../../api/types";
import { day } from "../../format/time";
import { typeset } from "../../format/words";
import { Icon } from "../../parts/Icon";
import { now, site } from "../../state";
import { Cards, Cell } from "../Cards";
import type { Installation } from "../types";
import { dueOf } from "./due";

const heads = ["Channel", "Instrument", "In it since", "Certificate", "Recalibration due"];

/** Which instrument sits in which channel since when, and how its certificate stands. */
export function InstrumentSection({ source, instruments }: { source: Source; instruments: Installation[] | null }) {
  return (
    <section id="instruments" tabIndex={-1} class="panel" aria-labelledby="instruments-title">
      <h2 id="instruments-title">Instruments and certificates</h2>
      {instruments === null ? (
        <p class="quiet">Reading…</p>
      ) : instruments.length === 0 ? (
        <p>No instrument is recorded in a channel of this source: nothing that it reads is traceable.</p>
      ) : (
        <Cards caption="Instruments installed now" heads={heads} isCaptionHidden>
          {instruments.map((stay) => (
            <InstrumentRow key={stay.channel} source={source} stay={stay} />
          ))}
        </Cards>
      )}
    </section>
  );
}

function InstrumentRow({ source, stay }: { source: Source; stay: Installation }) {
  const zone = site.value?.timeZone ?? "UTC";
  const date = (instant: string): string => day(new Date(instant), zone);
  const channel = source.channels.find((candidate) => candidate.id === stay.channel);
  return (
    <tr role="row">
      <Cell head={heads[0]!} isHeader>
        {typeset(channel?.name ?? stay.channel)} <code>{stay.channel}</code>
        {channel?.isReference === true && <span class="tag">reference</span>}
      </Cell>
      <Cell head={heads[1]!} class="wide">
        {typeset(stay.description)}, no. {stay.serialNumber}
      </Cell>
      <Cell head={heads[2]!} class="number">
        {date(stay.since)}
      </Cell>
      <Cell head={heads[3]!} class="wide">
        {stay.certificate === null ? (
          <span class="mark deviation">
            <Icon name="deviation" size={16} /> none in force
          </span>
        ) : (
          <>
            No. {stay.certificateNumber}, {typeset(stay.issuer ?? "")}
            {stay.validFrom !== null && `, of ${date(stay.validFrom)}`} <span class="quiet">({stay.certificate})</span>
          </>
        )}
      </Cell>
      <Cell head={heads[4]!} class="number">
        {stay.certificate !== null && <DueText dueAt={stay.dueAt} date={date} />}
      </Cell>
    </tr>
  );
}

function DueText({ dueAt, date }: { dueAt: string | null; date: (instant: string) => string }) {
  const due = dueOf(dueAt, now.value);
  const text = `${dueAt === null ? "" : `${date(dueAt)}, `}${due.text}`;
  return due.state === "overdue" ? (
    <span class="mark deviation">
      <Icon name="stop" size={16} /> {text}
    </span>
  ) : due.state === "soon" ? (
    <span class="mark deviation">
      <Icon name="deviation" size={16} /> {text}
    </span>
  ) : (
    <>{text}</>
  );
}
