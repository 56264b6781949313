import { signal } from "@preact/signals";
import { readEntry, readMe, signOut, type Entry, type Me, type Permission } from "../api/access";
import { Refusal, whenNeeded, type Need } from "../api/client";
import { listen, stopListening } from "../api/stream";
import { forget } from "../state";

/**
 * How things stand: nothing known yet, the service away before anything was known, nobody signed in, somebody signed in, or
 * a session that ended while its page was open. The last keeps the page, so that nothing typed into it is lost.
 */
export const access = signal<"asking" | "away" | "signed-out" | "signed-in" | "ended">("asking");
export const entry = signal<Entry | null>(null);
export const me = signal<Me | null>(null);

/** The one-time password just signed in with, so that nobody has to type it twice; only in memory, and gone with the choice of an own one. */
export const oneTimePassword = signal<string | null>(null);

/** Whether the person may do something; what somebody may not do is not offered. */
export const can = (permission: Permission): boolean => me.value?.permissions.includes(permission) === true;

const againMilliseconds = 3_000;
let waiting: { need: Need; answerTo: (answer: "again" | "leave") => void }[] = [];

/** Whether a change waits for the password, which was entered too long ago for it. */
export const confirming = signal(false);

/** Finds out who is there; tries again by itself while the service is away. */
export async function begin(): Promise<void> {
  try {
    const [facts, person] = await Promise.all([readEntry(), readMe()]);
    entry.value = facts;
    if (person === null) {
      access.value = "signed-out";
    } else {
      welcome(person);
    }
  } catch {
    access.value = "away";
    window.setTimeout(() => void begin(), againMilliseconds);
  }
}

/** Somebody has signed in. What waited for it goes on, unless it is somebody else: then it was not theirs to send. */
export function welcome(person: Me, password?: string): void {
  const isOther = me.value !== null && me.value.name !== person.name;
  if (isOther) {
    forget();
  }
  me.value = person;
  oneTimePassword.value = person.mustChangePassword ? (password ?? null) : null;
  if (entry.value !== null) {
    entry.value = { ...entry.value, setUpNeeded: false };
  }
  access.value = "signed-in";
  listen();
  settle(isOther ? "leave" : "again");
}

/** The session is over although its page is open: asks for a new sign-in above the page. */
export function sessionEnded(): void {
  if (access.value === "signed-in") {
    access.value = "ended";
    stopListening();
  }
}

/** Leaves: nothing of what was shown stays for the next person. */
export function leave(): void {
  stopListening();
  me.value = null;
  oneTimePassword.value = null;
  access.value = "signed-out";
  forget();
  settle("leave");
}

/** Ends the session at the service, then leaves; throws where the service does not do it. */
export async function endSession(): Promise<void> {
  try {
    await signOut();
  } catch (failure) {
    // A session that is over already needs no end.
    if (!(failure instanceof Refusal && failure.status === 401)) {
      throw failure;
    }
  }
  leave();
}

/** Reads the person anew, after something about them has changed. */
export async function refreshMe(): Promise<void> {
  const person = await readMe();
  if (person === null) {
    sessionEnded();
  } else {
    me.value = person;
    oneTimePassword.value = person.mustChangePassword ? oneTimePassword.value : null;
  }
}

/** The stream broke: finds out whether that is because the session is over. */
export async function probe(): Promise<void> {
  try {
    if ((await readMe()) === null) {
      sessionEnded();
    }
  } catch {
    // The service is away; the stream tries again by itself.
  }
}

/** The password was entered again, or the person does without what waited for it. */
export function confirmed(answer: "again" | "leave"): void {
  confirming.value = false;
  settle(answer, "password");
}

function settle(answer: "again" | "leave", need?: Need): void {
  const those = waiting.filter((one) => need === undefined || one.need === need);
  waiting = waiting.filter((one) => !those.includes(one));
  confirming.value = waiting.some((one) => one.need === "password");
  those.forEach(({ answerTo }) => answerTo(answer));
}

whenNeeded((need) => {
  if (access.value !== "signed-in" && access.value !== "ended") {
    return Promise.resolve("leave");
  }
  if (need === "own-password") {
    void refreshMe().catch(() => undefined);
    return Promise.resolve("leave");
  }
  if (need === "sign-in") {
    sessionEnded();
  } else {
    confirming.value = true;
  }
  return new Promise((answerTo) => waiting.push({ need, answerTo }));
});
