import { afterEach, describe, expect, it } from "vitest";
import { adoptEnvironment } from "@/lib/env/env";
import { checkOrigin } from "@/lib/http/origin";

const post = (url: string, headers: Record<string, string>) => new Request(url, { method: "POST", headers });
const site = (address: string) => adoptEnvironment({ NEXTAUTH_URL: address });

afterEach(() => {
  adoptEnvironment({ NEXTAUTH_URL: "" });
});

describe("a write that carries a cookie", () => {
  it("is taken from this site's own pages", () => {
    site("https://fans.example");
    expect(() =>
      checkOrigin(post("https://fans.example/x", { origin: "https://fans.example", cookie: "a=b" })),
    ).not.toThrow();
  });

  it("is refused from another site, from an opaque origin, and without any", () => {
    site("https://fans.example");
    const foreign = ["https://evil.example", "null", "http://fans.example", "https://fans.example.evil.example"];
    for (const origin of foreign) {
      expect(() => checkOrigin(post("https://fans.example/x", { origin, cookie: "a=b" }))).toThrow(/page of this site/);
    }
    expect(() => checkOrigin(post("https://fans.example/x", { cookie: "a=b" }))).toThrow(/page of this site/);
  });

  it("may come from any loopback name on loopback, if the Host is the same one", () => {
    site("http://127.0.0.1:3000");
    const headers = { origin: "http://localhost:3000", host: "localhost:3000", cookie: "a=b" };
    expect(() => checkOrigin(post("http://localhost:3000/x", headers))).not.toThrow();
    expect(() => checkOrigin(post("http://x/x", { ...headers, host: "localhost:4000" }))).toThrow();
    expect(() =>
      checkOrigin(post("http://x/x", { ...headers, origin: "http://a.example", host: "a.example" })),
    ).toThrow();
  });
});

describe("other requests", () => {
  it("are taken without an Origin when they carry no cookie, or only read", () => {
    site("https://fans.example");
    expect(() => checkOrigin(post("https://fans.example/x", {}))).not.toThrow();
    expect(() => checkOrigin(new Request("https://fans.example/x", { headers: { cookie: "a=b" } }))).not.toThrow();
  });
});
