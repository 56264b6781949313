import { Fold } from "../parts/Fold";
import { go } from "../shell/router";
import { isWide } from "../shell/width";
import { site } from "../state";
import { addressOf, filterFrom, isFiltered, timeField, type TrailFilter } from "./query";
import { actions, actionWord } from "./words";

/** Which entries are shown. The address carries the choice, so that it can be handed on. */
export function TrailFilters({ filter }: { filter: TrailFilter }) {
  return (
    <section class="panel" aria-label="Filter">
      <Fold opensByItself={isWide() || isFiltered(filter)} summary={<strong>Filter</strong>}>
        <Form key={addressOf(filter)} filter={filter} />
      </Fold>
    </section>
  );
}

function Form({ filter }: { filter: TrailFilter }) {
  const zone = site.value?.timeZone ?? "UTC";
  const known = filter.action === "" || actions.includes(filter.action) ? actions : [...actions, filter.action];
  return (
    <form
      class="controls filters"
      role="search"
      aria-label="Entries shown"
      onSubmit={(event) => {
        event.preventDefault();
        go(addressOf(filterFrom(new FormData(event.currentTarget), zone)));
      }}
    >
      <label>
        What happened
        <select id="filter-action" name="action" defaultValue={filter.action}>
          <option value="">anything</option>
          {known.map((action) => (
            <option key={action} value={action} selected={action === filter.action}>
              {actionWord(action)}
            </option>
          ))}
        </select>
      </label>
      <label>
        Who
        <input type="text" name="actor" autocomplete="off" autocapitalize="off" spellcheck={false} maxLength={63} placeholder="account, or labwatch" defaultValue={filter.actor} />
      </label>
      <label>
        About
        <input type="text" name="subject" autocomplete="off" autocapitalize="off" spellcheck={false} maxLength={200} placeholder="for example alert/" defaultValue={filter.subject} />
      </label>
      <label>
        From (site’s time)
        <input type="datetime-local" name="from" defaultValue={timeField(filter.from, zone)} />
      </label>
      <label>
        To, excluded (site’s time)
        <input type="datetime-local" name="to" defaultValue={timeField(filter.to, zone)} />
      </label>
      <div class="buttons">
        <button type="submit" class="act">
          Show
        </button>
        {isFiltered(filter) && <a href="/trail">Show everything</a>}
      </div>
    </form>
  );
}
