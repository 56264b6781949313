/** Text of a field without spaces around it; null where it is empty. */
export function textIn(fields: FormData, name: string): string | null {
  const text = String(fields.get(name) ?? "").trim();
  return text === "" ? null : text;
}

/** Text of a field in one line. */
export const lineIn = (fields: FormData, name: string): string | null => textIn(fields, name)?.replaceAll(/\s+/g, " ") ?? null;

/** A number as people type it, with a comma or a true minus sign too; not a number where it is none. */
export function numberIn(fields: FormData, name: string): number {
  return numberOf(textIn(fields, name) ?? "");
}

export function numberOf(typed: string): number {
  const text = typed.trim().replace("−", "-").replace(",", ".");
  return /^[+-]?\d+(\.\d+)?$/.test(text) ? Number(text) : Number.NaN;
}
