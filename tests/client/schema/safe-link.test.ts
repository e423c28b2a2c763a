// @vitest-environment node
import { describe, expect, it } from "vitest";
import { isSafeLink } from "#schema/safe-link.ts";

describe("an address a link may have", () => {
  it.each([
    "https://example.org/a?b=c#d",
    "http://example.org",
    "HTTPS://EXAMPLE.ORG",
    "mailto:wren@example.org",
  ])("%s is safe", (address) => expect(isSafeLink(address)).toBe(true));
  it.each([
    "javascript:alert(1)",
    "JaVaScRiPt:alert(1)",
    "java\nscript:alert(1)",
    "\u0001javascript:alert(1)",
    " javascript:alert(1)",
    "data:text/html,<script>alert(1)</script>",
    "vbscript:x",
    "file:///etc/passwd",
    "//example.org",
    "/shelf",
    "example.org",
    "",
    null,
    { toString: () => "https://example.org" },
  ])("%j is not", (address) => expect(isSafeLink(address)).toBe(false));
});
