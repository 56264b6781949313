import { describe, expect, it } from "vitest";
import { accountName, credentialsIn, destination, signInAddress } from "./arrival";
import { charactersOf, lengthText } from "./passwords";
import { rolesText, whoMay } from "./roles";

const origin = "https://lab.example";

describe("after signing in", () => {
  it("goes to the page that was asked for", () => {
    expect(destination("/trail?actor=t-thorn#x", origin)).toBe("/trail?actor=t-thorn#x");
    expect(destination("/sources/hollin-vale.fir", origin)).toBe("/sources/hollin-vale.fir");
  });
  it("goes nowhere else", () => {
    for (const asked of [null, "", "https://elsewhere.example/trail", "//elsewhere.example/trail", "/\\elsewhere.example", "javascript:alert(1)", "/api/v1/sources", "/sign-in", "/set-up", "/nowhere"]) {
      expect(destination(asked, origin)).toBe("/");
    }
  });
  it("comes back to where the sign-in page was told of", () => {
    const address = new URL(signInAddress("/trail?from=a&to=b"), origin);
    expect(destination(address.searchParams.get("to"), origin)).toBe("/trail?from=a&to=b");
    expect(signInAddress("/")).toBe("/sign-in");
  });
});

describe("a one-time link", () => {
  it("carries a name and a code", () => expect(credentialsIn("#name=t-thorn&code=a%2Bb")).toEqual({ name: "t-thorn", code: "a+b" }));
  it("of the set-up carries a code alone", () => expect(credentialsIn("#code=x")).toEqual({ code: "x" }));
  it("is none where it carries neither", () => expect(credentialsIn("#hazards")).toBeNull());
});

describe("an account's name", () => {
  it("is made from a person's", () => {
    expect(accountName("Renée O'Hara")).toBe("renee-o-hara");
    expect(accountName("  T. Thorn ")).toBe("t-thorn");
    expect(accountName("Żółć")).toMatch(/^[a-z0-9][a-z0-9-]*$/);
    expect(accountName("李")).toBe("");
  });
});

describe("the length of a password", () => {
  // NIST SP 800-63B-4, 3.1.1.2: each Unicode code point counts as one character.
  it("counts code points", () => {
    expect(charactersOf("🔥a")).toBe(2);
    expect(charactersOf("e\u0301")).toBe(1);
    expect(lengthText("")).toBe("");
    expect(lengthText("🔥🔥🔥")).toBe("3 of at least 15 characters");
    expect(lengthText("fifteen letters")).toBe("15 characters: long enough");
  });
});

describe("roles", () => {
  it("are said in one order", () => {
    expect(rolesText(["auditor", "technician"])).toBe("Technician, Auditor");
    expect(rolesText([])).toBe("no role");
  });
  it("say who may do something", () => {
    expect(whoMay("acknowledge")).toBe("a technician or a quality manager");
    expect(whoMay("manage-accounts")).toBe("an administrator");
    expect(whoMay("read-trail")).toBe("a quality manager, an auditor or an administrator");
  });
});
