import { placeOf } from "../shell/routes";

export interface Credentials { name?: string; code?: string }

/** What a one-time link carries behind the #, which a browser sends to nobody: a name and a code; null where it carries neither. */
export function credentialsIn(fragment: string): Credentials | null {
  const fields = new URLSearchParams(fragment.replace(/^#/, ""));
  const name = fields.get("name");
  const code = fields.get("code");
  return name === null && code === null ? null : { ...(name === null ? {} : { name }), ...(code === null ? {} : { code }) };
}

/** Where to go after signing in: the page that was asked for where it is one of these, else the first. */
export function destination(asked: string | null, origin: string): string {
  if (asked === null || !asked.startsWith("/")) {
    return "/";
  }
  const target = URL.canParse(asked, origin) ? new URL(asked, origin) : null;
  const isOurs = target !== null && target.origin === origin && !["unknown", "sign-in", "set-up"].includes(placeOf(target).page);
  return isOurs ? target.pathname + target.search + target.hash : "/";
}

/** The address of the sign-in page that leads back to where somebody wanted to be. */
export const signInAddress = (wanted: string): string => (wanted === "/" ? "/sign-in" : `/sign-in?to=${encodeURIComponent(wanted)}`);

/** An account's name made from a person's: "Renée O'Hara" gives "renee-o-hara". */
export const accountName = (displayName: string): string =>
  displayName
    .normalize("NFKD")
    .replaceAll(/\p{M}/gu, "")
    .toLowerCase()
    .replaceAll(/[^a-z0-9]+/g, "-")
    .replaceAll(/^-+|-+$/g, "")
    .slice(0, 63);
