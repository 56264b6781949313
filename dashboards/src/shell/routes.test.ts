import { describe, expect, it } from "vitest";
import { placeOf, sourceAddress } from "./routes";

const at = (path: string) => placeOf(new URL(path, "http://127.0.0.1:5080"));

describe("an address", () => {
  it("leads to its page", () => {
    expect(at("/").page).toBe("glance");
    expect(at("/trail?action=signed-in").page).toBe("trail");
    expect(at("/sign-in#name=a&code=b").page).toBe("sign-in");
    expect(at("/people/").page).toBe("people");
  });
  it("of a source carries its id", () => {
    expect(at("/sources/hollin-vale.fir")).toMatchObject({ page: "source", id: "hollin-vale.fir" });
    expect(at(sourceAddress("a b/c"))).toMatchObject({ page: "source", id: "a b/c" });
  });
  it("keeps what it asks of the page", () => expect(at("/trail?actor=r-hale").query.get("actor")).toBe("r-hale"));
  it("that leads nowhere says so", () => {
    expect(at("/sources").page).toBe("unknown");
    expect(at("/sources//").page).toBe("unknown");
    expect(at("/sources/a/b").page).toBe("unknown");
    expect(at("/sources/%E0%A4%A").page).toBe("unknown");
    expect(at("/Trail").page).toBe("unknown");
  });
});
