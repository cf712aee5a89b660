import { describe, expect, it } from "vitest";
import { handlePattern, passwordProblem } from "@/lib/domain/accounts/credentials";
import { pathAfterSignIn } from "@/lib/client/session-paths";
import { hashPassword, passwordFits } from "@/lib/services/passwords/passwords";

describe("a password that somebody chooses", () => {
  it("needs twelve characters, counted as people see them", () => {
    expect(passwordProblem("elevenchars")).toBeDefined();
    expect(passwordProblem("twelve chars")).toBeUndefined();
    expect(passwordProblem("🌀🌊🪁🍃🌬️")).toBeDefined();
  });

  it("may not repeat few characters or hold one's own name", () => {
    expect(passwordProblem("aaaabbbbaaaabbbb")).toBeDefined();
    expect(passwordProblem("quillwork likes fans", { handle: "quillwork" })).toBeDefined();
    expect(passwordProblem("Marsh.Tern 2031 x", { email: "marsh.tern@alder.example" })).toBeDefined();
    expect(passwordProblem("slow mills turn", { handle: "osier", email: "o@alder.example" })).toBeUndefined();
  });
});

describe("a stored password", () => {
  it("is argon2id with the first parameters of OWASP's Password Storage Cheat Sheet: m=19456, t=2, p=1", async () => {
    // PHC string format: $argon2id$v=19$m=…,t=…,p=…$salt$hash; 19 is version 0x13 of RFC 9106.
    expect(await hashPassword("slow mills turn")).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$[^$]{22,}\$[^$]{40,}$/);
  });

  it("fits only itself, in either Unicode form, and never an account without one", async () => {
    const stored = await hashPassword("mühle am fluss");
    expect(await passwordFits(stored, "mu\u0308hle am fluss")).toBe(true);
    expect(await passwordFits(stored, "muhle am fluss")).toBe(false);
    expect(await passwordFits(undefined, "mühle am fluss")).toBe(false);
  });
});

describe("where sign-in leads", () => {
  it("is always a path of this site", () => {
    expect(pathAfterSignIn("/bench/sessions/1?a=b")).toBe("/bench/sessions/1?a=b");
    for (const to of [
      undefined,
      "",
      "//evil.example",
      "/\\evil.example",
      "https://evil.example",
      "javascript:1",
      "/a\\b",
    ]) {
      expect(pathAfterSignIn(to)).toBe("/");
    }
  });
});

describe("a handle", () => {
  it("is two to thirty lower-case letters, digits or hyphens and doesn't begin with one", () => {
    for (const handle of ["ab", "quill-work", "7tarn"]) expect(handlePattern.test(handle)).toBe(true);
    for (const handle of ["a", "-ab", "Ab", "a b", "a".repeat(31), "ü2"])
      expect(handlePattern.test(handle)).toBe(false);
  });
});
