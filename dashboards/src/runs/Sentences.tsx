import { typeset } from "../format/words";

/** What was refused, where a screen reader hears it. */
export function Sentences({ sentences }: { sentences: string[] }) {
  return (
    <div role="alert">
      {sentences.map((sentence) => (
        <p key={sentence} class="abnormal">
          {typeset(sentence)}
        </p>
      ))}
    </div>
  );
}
