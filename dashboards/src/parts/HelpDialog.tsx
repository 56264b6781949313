import type { ReadinessState } from "../api/types";
import { readinessMeaning, readinessWord } from "../format/words";
import { usesShortcuts } from "../shortcuts";
import { remember } from "../memory";
import { caution } from "../state";
import { Dialog } from "./Dialog";

const terms: [string, string][] = [
  ["Reference blackbody source", "A heated or cooled cavity that radiates almost like a blackbody, so that its radiance is known from its temperature."],
  ["Well", "A bore in the wall of the cavity that holds a contact thermometer. The reference well is the one that the source's temperature is taken from."],
  ["Aperture and lip", "The opening of the cavity, at the left in each drawing, and the rim around it."],
  ["Wall shading", "The wall is shaded by what its wells measure, from the coldest to the hottest of them, with straight lines between; the key under each drawing says how far apart they are."],
  ["U, k", "Expanded uncertainty and its coverage factor, as the certificate of the thermometer states them. It is the uncertainty of that thermometer, not of the source's radiance."],
  ["Stability", "Half of the range of 10 s means over 30 minutes of the reference thermometer, against the laboratory's acceptance limit."],
  ["Pass, conditional pass, conditional fail, fail", "Decisions with a guard band as wide as the expanded uncertainty (ILAC-G8:09/2019)."],
  ["Standing, gone, acknowledged", "An alert stands while its condition does. It is over when the condition has gone and somebody has acknowledged it (IEC 62682)."],
];

const keys: [string, string][] = [
  ["?", "This help"],
  ["O", "Overview of all sources"],
  ["T", "Trail"],
  ["M", "My page"],
  ["H", "Hazards (overview)"],
  ["S", "Sources (overview)"],
  ["C", "Chart (overview)"],
  ["A", "Alerts (overview)"],
  ["1 to 5", "Stretch of time of the chart (overview)"],
  ["Esc", "Close a dialog or menu"],
];

/** What the words on the page mean, and which keys there are. */
export function HelpDialog({ onClose }: { onClose: () => void }) {
  return (
    <Dialog title="Help" onClose={onClose}>
      <p class="caution">{caution.value}</p>
      <h3>May I calibrate now?</h3>
      <dl class="terms">
        {(Object.keys(readinessWord) as ReadinessState[]).map((state) => (
          <div key={state}>
            <dt>{readinessWord[state]}</dt>
            <dd>{readinessMeaning[state]}</dd>
          </div>
        ))}
      </dl>
      <h3>Words</h3>
      <dl class="terms">
        {terms.map(([term, meaning]) => (
          <div key={term}>
            <dt>{term}</dt>
            <dd>{meaning}</dd>
          </div>
        ))}
      </dl>
      <h3>Keys</h3>
      <dl class="terms keys">
        {keys.map(([key, does]) => (
          <div key={key}>
            <dt>
              <kbd>{key}</kbd>
            </dt>
            <dd>{does}</dd>
          </div>
        ))}
      </dl>
      <label class="inline">
        <input
          type="checkbox"
          checked={usesShortcuts.value}
          onChange={(event) => {
            usesShortcuts.value = event.currentTarget.checked;
            remember("shortcuts", event.currentTarget.checked ? "on" : "off");
          }}
        />
        Single keys work (turn off where they get in the way of speech input)
      </label>
      <div class="buttons">
        <button type="button" onClick={onClose}>
          Close
        </button>
      </div>
    </Dialog>
  );
}
