import type { Refusal } from "../api/client";
import { typeset } from "../format/words";

/** Why something could not be read; it is tried again by itself, or at once by the button. */
export function Failed({ failure, what, onAgain }: { failure: Refusal; what: string; onAgain: () => void }) {
  return (
    <div class="failed" role="status">
      <p class="abnormal">{what}</p>
      {failure.sentences.map((sentence) => (
        <p key={sentence}>{typeset(sentence)}</p>
      ))}
      <button type="button" onClick={onAgain}>
        Try again
      </button>
    </div>
  );
}
