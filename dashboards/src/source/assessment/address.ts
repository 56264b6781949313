import { sourceAddress } from "../../shell/routes";

/** The address of an assessment on its source's page, to be shared. */
export const assessmentAddress = (source: string, id: string): string => `${sourceAddress(source)}?assessment=${encodeURIComponent(id)}`;
