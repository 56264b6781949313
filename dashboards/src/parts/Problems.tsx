import { typeset } from "../format/words";

/** What went wrong, read out at once. */
export function Problems({ sentences }: { sentences: string[] }) {
  return (
    <div role="alert">
      {sentences.map((sentence) => (
        <p key={sentence} class="problem">
          {typeset(sentence)}
        </p>
      ))}
    </div>
  );
}
