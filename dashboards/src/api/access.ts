import { ask, Refusal, remove, send } from "./client";

export type Role = "technician" | "quality-manager" | "auditor" | "administrator";
export type Permission = "read" | "acknowledge" | "record-runs" | "revise-records" | "read-trail" | "manage-accounts" | "inject-faults";

/** What is said to everybody, signed in or not. */
export interface Entry { siteName: string; version: string; isDemo: boolean; setUpNeeded: boolean; caution: string }

/** The person who is signed in. */
export interface Me {
  name: string;
  displayName: string;
  roles: Role[];
  permissions: Permission[];
  mustChangePassword: boolean;
  expiresAt: string;
}

export interface Account {
  name: string;
  displayName: string;
  roles: Role[];
  disabled: boolean;
  createdAt: string;
  lastSignInAt: string | null;
  mustChangePassword: boolean;
}

export const readEntry = (): Promise<Entry> => ask("sign-in", { isOpen: true });

/** The person of this session; null where there is none. */
export async function readMe(): Promise<Me | null> {
  try {
    return await ask<Me>("me", { isOpen: true });
  } catch (failure) {
    if (failure instanceof Refusal && failure.status === 401) {
      return null;
    }
    throw failure;
  }
}

export const signIn = (name: string, password: string): Promise<Me> => send("sign-in", { name, password }, { isOpen: true });
export const signOut = (): Promise<void> => send("sign-out", {}, { isOpen: true });
export const setUp = (code: string, name: string, displayName: string, password: string): Promise<Me> =>
  send("set-up", { code, name, displayName, password }, { isOpen: true });

export const changePassword = (current: string, next: string): Promise<void> => send("me/password", { current, new: next });

/** An account after a change; `oneTimePassword` only where the change made one: it is shown this once. */
export interface AccountChange { account: Account; oneTimePassword: string | null }

export const listAccounts = (): Promise<{ items: Account[] }> => ask("accounts");
export const addAccount = (name: string, displayName: string, roles: Role[]): Promise<AccountChange> => send("accounts", { name, displayName, roles });
export const changeAccount = (name: string, change: { displayName?: string; roles?: Role[]; disabled?: boolean; resetPassword?: boolean }): Promise<AccountChange> =>
  send(`accounts/${encodeURIComponent(name)}`, change);

/** A token for a program that speaks for its owner; it counts for those of its roles that the owner still has. */
export interface Token {
  id: string;
  account: string;
  name: string;
  roles: Role[];
  createdAt: string;
  expiresAt: string;
  lastUsedAt: string | null;
  revokedAt: string | null;
}

export const listTokens = (): Promise<{ items: Token[] }> => ask("tokens");
export const createToken = (name: string, roles: Role[], expiresInDays: number): Promise<{ token: Token; value: string }> => send("tokens", { name, roles, expiresInDays });
export const revokeToken = (id: string): Promise<void> => remove(`tokens/${encodeURIComponent(id)}`);

/** Somebody signed in at a browser. */
export interface Session { id: string; startedAt: string; lastUsedAt: string; expiresAt: string; address: string; agent: string; isCurrent: boolean }

export const listSessions = (): Promise<{ items: Session[] }> => ask("me/sessions");
export const endOtherSession = (id: string): Promise<void> => remove(`me/sessions/${encodeURIComponent(id)}`);

/** Says the password again, for changes that want it fresh. */
export const confirmPassword = (password: string): Promise<Me> => send("me/confirm", { password }, { isOpen: true });
