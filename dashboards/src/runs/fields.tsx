import type { Source } from "../api/types";
import { fixed } from "../format/numbers";
import { bandName } from "../source/criteria";
import { numberOf } from "./form";

/** Job and item of a run. */
export function ItemFields({ job, item }: { job?: string; item?: string }) {
  return (
    <>
      <label>
        Job number
        <input type="text" name="jobNumber" required autofocus maxLength={60} autocomplete="off" defaultValue={job ?? ""} />
      </label>
      <label>
        Item (kind and serial number)
        <input type="text" name="item" required maxLength={200} autocomplete="off" defaultValue={item ?? ""} />
      </label>
    </>
  );
}

export function SetPointField({ value, onValue }: { value: string; onValue?: (celsius: number) => void }) {
  return (
    <label>
      Set point, °C
      <input type="text" name="setPoint" inputMode="decimal" required pattern="\s*[\-+−]?\d+([.,]\d+)?\s*" title="A number, for example 300 or -15.5" autocomplete="off" defaultValue={value} onInput={(event) => onValue?.(numberOf(event.currentTarget.value))} />
    </label>
  );
}

/** The working band; a source with one band has nothing to choose. */
export function BandField({ source, value, isKept }: { source: Source; value: string; isKept?: boolean }) {
  return (
    <label>
      Working band
      <select name="band" defaultValue={value}>
        {source.bands.map((band) => (
          <option key={band.id} value={band.id} selected={band.id === value}>
            {bandName(band)}
            {/\d/.test(band.name) ? "" : ` (${fixed(band.lowerMicrometre, 1)} to ${fixed(band.upperMicrometre, 1)} µm)`}
          </option>
        ))}
        {isKept !== true && (
          <option value="" selected={value === ""}>
            not stated
          </option>
        )}
      </select>
    </label>
  );
}

export function NoteField({ value, label }: { value?: string; label?: string }) {
  return (
    <label>
      {label ?? "Note (may stay empty)"}
      <textarea name="note" rows={2} maxLength={1000} defaultValue={value ?? ""} />
    </label>
  );
}
