import type { TrailHead } from "../api/trail";
import { Copy } from "../parts/Copy";
import { Fold } from "../parts/Fold";
import { isWide } from "../shell/width";

/** What the chain proves, what it does not, how to verify it, and what to write down. */
export function ChainHead({ head }: { head: TrailHead | null }) {
  return (
    <section class="panel" aria-label="The chain">
      <Fold opensByItself={isWide()} summary={<strong>{head === null ? "What the trail proves" : `Head: entry ${head.sequence}. What the trail proves`}</strong>}>
        <p>
          Each entry carries the digest of the one before it and of the record that it speaks of, so that a later change of either shows; it does not prove that what was recorded was true, nor, unless
          you kept an earlier head elsewhere, that nobody with the whole data directory wrote it anew.
        </p>
        {head !== null && (
          <p>
            Head to write down and keep elsewhere: <Copy text={`${head.sequence}:${head.digest}`} label="the head" />
          </p>
        )}
        <p>
          Verify it where the service runs: <code class="command">labwatch verify --data DIR</code>; add <code class="command">--head</code> and a head that you kept.
        </p>
      </Fold>
    </section>
  );
}
