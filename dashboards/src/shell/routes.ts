/** Every page there is, with the pattern of its address; `:id` stands for one part of the path. */
export const patterns = {
  glance: "/",
  source: "/sources/:id",
  "sign-in": "/sign-in",
  "set-up": "/set-up",
  trail: "/trail",
  people: "/people",
  me: "/me",
} as const;

export type Page = keyof typeof patterns | "unknown";

/** Where somebody is: the page, the id in its path, and what the address asks of it. */
export interface Place { page: Page; id: string | null; path: string; query: URLSearchParams }

/** The page that an address leads to; the end of a path may have a slash too many. */
export function placeOf(address: URL): Place {
  const path = address.pathname.replace(/(.)\/+$/, "$1");
  for (const [page, pattern] of Object.entries(patterns) as [Page, string][]) {
    const id = match(pattern, path);
    if (id !== undefined) {
      return { page, id, path, query: address.searchParams };
    }
  }
  return { page: "unknown", id: null, path, query: address.searchParams };
}

/** The address of a source's page. */
export const sourceAddress = (id: string): string => `/sources/${encodeURIComponent(id)}`;

function match(pattern: string, path: string): string | null | undefined {
  const parts = path.split("/");
  const wanted = pattern.split("/");
  let id: string | null = null;
  const fits =
    parts.length === wanted.length &&
    wanted.every((want, index) => {
      if (want !== ":id") {
        return want === parts[index];
      }
      id = decoded(parts[index]!);
      return id !== null && id !== "";
    });
  return fits ? id : undefined;
}

function decoded(part: string): string | null {
  try {
    return decodeURIComponent(part);
  } catch {
    return null;
  }
}
