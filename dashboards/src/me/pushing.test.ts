import { describe, expect, it } from "vitest";
import { bytesOf, deviceName } from "./pushing";

describe("bytesOf", () => {
  // RFC 4648, section 10, without padding as section 5 allows.
  it.each([
    ["", []],
    ["Zg", [0x66]],
    ["Zm8", [0x66, 0x6f]],
    ["Zm9v", [0x66, 0x6f, 0x6f]],
    ["-_8", [0xfb, 0xff]],
  ])("reads %s", (text, bytes) => expect([...bytesOf(text)]).toEqual(bytes));
});

describe("deviceName", () => {
  it("names the system of a phone", () => expect(deviceName("Mozilla/5.0 (Linux; Android 15; Pixel)")).toBe("Android device"));
  it("has a name for anything", () => expect(deviceName("")).toBe("This device"));
});
