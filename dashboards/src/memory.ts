// What this browser remembers for its user; a browser that forbids it only forgets.

export function recall(key: string): string | null {
  try {
    return localStorage.getItem(`labwatch.${key}`);
  } catch {
    return null;
  }
}

export function remember(key: string, value: string): void {
  try {
    localStorage.setItem(`labwatch.${key}`, value);
  } catch {
    // Private browsing: the next visit starts afresh.
  }
}
