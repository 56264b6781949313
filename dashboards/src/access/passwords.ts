/** The shortest password that is taken, in characters as people count them (NIST SP 800-63B, 3.1.1.2: code points). */
export const leastCharacters = 15;

/** Characters of a password as the service counts them: code points, after composing letters and marks. */
export const charactersOf = (password: string): number => [...password.normalize("NFC")].length;

/** How far a password is from being long enough, in words; empty where nothing is typed. */
export function lengthText(password: string): string {
  const count = charactersOf(password);
  if (count === 0) {
    return "";
  }
  return count < leastCharacters ? `${count} of at least ${leastCharacters} characters` : `${count} characters: long enough`;
}
