import { typeset } from "../format/words";
import { detailParts, type Advice } from "../hazards/board";

/** An alert's whole detail. */
export function Detail({ text }: { text: string }) {
  const { what, advice } = detailParts(text);
  return (
    <>
      {what.map((line) => (
        <p key={line}>{typeset(line)}</p>
      ))}
      <AdviceLines advice={advice} />
    </>
  );
}

export function AdviceLines({ advice }: { advice: Advice[] }) {
  return (
    <>
      {advice.map(({ label, text }) => (
        <p key={label}>
          <strong>{label}: </strong>
          {typeset(text)}
        </p>
      ))}
    </>
  );
}
