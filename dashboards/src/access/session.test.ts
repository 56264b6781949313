import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { ask, Refusal, send } from "../api/client";
import type { Me } from "../api/access";
import { access, begin, can, confirmed, confirming, leave, me, welcome } from "./session";

class SilentStream {
  static readonly CLOSED = 2;
  addEventListener(): void {}
  close(): void {}
}

const person = (name: string): Me => ({ name, displayName: name, roles: ["technician"], permissions: ["read", "acknowledge"], mustChangePassword: false, expiresAt: "2026-12-01T20:00:00Z" });
const answer = (status: number, body: unknown, headers: Record<string, string> = {}) =>
  new Response(JSON.stringify(body), { status, headers: { "Content-Type": status < 400 ? "application/json" : "application/problem+json", ...headers } });
const fetched = vi.fn<(path: string, init: RequestInit) => Promise<Response>>();

beforeEach(() => {
  vi.stubGlobal("EventSource", SilentStream);
  vi.stubGlobal("window", { setTimeout: () => 0, clearTimeout: () => undefined });
  vi.stubGlobal("fetch", fetched);
  fetched.mockReset();
  leave();
});
afterEach(() => vi.unstubAllGlobals());

describe("a request whose session has ended", () => {
  it("waits for the same person to sign in again, and is then sent as it was", async () => {
    welcome(person("t-thorn"));
    fetched.mockResolvedValueOnce(answer(401, {})).mockResolvedValueOnce(answer(200, { done: true }));
    const asked = send("alerts/1/acknowledge", { note: "barrier set up" });
    await vi.waitFor(() => expect(access.value).toBe("ended"));
    expect(me.value?.name).toBe("t-thorn");
    welcome(person("t-thorn"));
    await expect(asked).resolves.toEqual({ done: true });
    expect(fetched.mock.calls[1]![1].body).toBe('{"note":"barrier set up"}');
  });
  it("is never sent in another person's name", async () => {
    welcome(person("t-thorn"));
    fetched.mockResolvedValue(answer(401, { title: "Nobody is signed in." }));
    const asked = send("alerts/1/acknowledge", {});
    await vi.waitFor(() => expect(access.value).toBe("ended"));
    welcome(person("q-quill"));
    await expect(asked).rejects.toMatchObject({ status: 401 });
    expect(fetched).toHaveBeenCalledTimes(1);
    expect(access.value).toBe("signed-in");
  });
  it("is refused where the person leaves instead", async () => {
    welcome(person("t-thorn"));
    fetched.mockResolvedValue(answer(401, {}));
    const asked = ask("audit");
    await vi.waitFor(() => expect(access.value).toBe("ended"));
    leave();
    await expect(asked).rejects.toBeInstanceOf(Refusal);
    expect(access.value).toBe("signed-out");
    expect(me.value).toBeNull();
  });
});

describe("a change that wants the password fresh", () => {
  const stale = () => answer(403, { title: "Not now.", findings: [{ code: "confirm-password", where: "", message: "The password was entered too long ago for this.", value: null, cure: "Enter it again." }] });
  it("waits for it, and is then sent", async () => {
    welcome(person("a-ash"));
    fetched.mockResolvedValueOnce(stale()).mockResolvedValueOnce(answer(200, { done: true }));
    const asked = send("accounts", {});
    await vi.waitFor(() => expect(confirming.value).toBe(true));
    confirmed("again");
    await expect(asked).resolves.toEqual({ done: true });
    expect(confirming.value).toBe(false);
  });
  it("is not made where the person does without", async () => {
    welcome(person("a-ash"));
    fetched.mockResolvedValue(stale());
    const asked = send("accounts", {});
    await vi.waitFor(() => expect(confirming.value).toBe(true));
    confirmed("leave");
    await expect(asked).rejects.toMatchObject({ status: 403 });
  });
});

describe("the first look", () => {
  const facts = { siteName: "Hollin Vale", version: "1", isDemo: true, setUpNeeded: false, caution: "" };
  const answers = (whoIsThere: Response) => fetched.mockImplementation((path) => Promise.resolve(path.endsWith("/me") ? whoIsThere : answer(200, facts)));
  it("finds nobody", async () => {
    answers(answer(401, {}));
    await begin();
    expect(access.value).toBe("signed-out");
    expect(can("read")).toBe(false);
  });
  it("finds who is signed in, and what they may do", async () => {
    answers(answer(200, person("t-thorn")));
    await begin();
    expect(access.value).toBe("signed-in");
    expect(can("acknowledge")).toBe(true);
    expect(can("manage-accounts")).toBe(false);
  });
  it("says that the service is away", async () => {
    fetched.mockRejectedValue(new TypeError("failed"));
    await begin();
    expect(access.value).toBe("away");
  });
});

it("a refusal tells how long to wait", async () => {
  fetched.mockResolvedValue(answer(429, { title: "Too many tries." }, { "Retry-After": "42" }));
  await expect(send("sign-in", {}, { isOpen: true })).rejects.toMatchObject({ status: 429, retryAfterSeconds: 42 });
});
