import { lineIn, numberIn, textIn } from "./form";
import type { Correction, Run } from "./types";

/** What a filled-in form changes about a run; null where it changes nothing. What is on record can be changed, not emptied. */
export function correctionOf(run: Run, fields: FormData, reason: string): Correction | null {
  const asked = { jobNumber: lineIn(fields, "jobNumber"), item: lineIn(fields, "item"), setPointCelsius: numberIn(fields, "setPoint"), band: textIn(fields, "band"), note: textIn(fields, "note") };
  const changed = Object.entries(asked).filter(([name, value]) => value !== null && value !== run[name as keyof typeof asked]);
  return changed.length === 0 ? null : { ...Object.fromEntries(changed), reason };
}
