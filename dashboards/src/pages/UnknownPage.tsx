import { PageHead } from "../shell/PageHead";
import { place } from "../shell/router";

/** An address that leads nowhere. */
export function UnknownPage() {
  return (
    <>
      <PageHead title="There is no such page" />
      <p class="panel">
        Nothing is at <code>{place.value.path}</code>. It may be mistyped, or from another version. <a href="/">All sources</a>
      </p>
    </>
  );
}
