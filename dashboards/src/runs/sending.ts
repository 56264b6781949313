import { useRef, useState } from "preact/hooks";
import { Refusal } from "../api/client";

/** One thing that is sent: a second press while the first is under way does nothing, and what was refused is told. */
export interface Sending { isSending: boolean; sentences: string[]; send: (work: () => Promise<void>) => void }

export function useSending(): Sending {
  // A ref, since a second tap can come before the page is drawn again.
  const busy = useRef(false);
  const [isSending, setSending] = useState(false);
  const [sentences, setSentences] = useState<string[]>([]);
  const send = (work: () => Promise<void>): void => {
    if (busy.current) {
      return;
    }
    busy.current = true;
    setSending(true);
    setSentences([]);
    work()
      .catch((failure: unknown) => setSentences(failure instanceof Refusal ? failure.sentences : ["It could not be sent."]))
      .finally(() => {
        busy.current = false;
        setSending(false);
      });
  };
  return { isSending, sentences, send };
}
