import type { Source } from "../api/types";
import { link, now } from "../state";

/** Whether what is shown of a source may be taken as the present: the service is heard and the source is not silent. */
export const isCurrent = (source: Source): boolean => link.value === "live" && !source.status.isSilent && source.status.newestReadingAt !== null;

/** Age of an instant by the service's clock, milliseconds. */
export const ageOf = (instant: string): number => now.value - Date.parse(instant);
