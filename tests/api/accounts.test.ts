import { request as httpRequest } from "node:http";
import path from "node:path";
import { randomBytes } from "node:crypto";
import { describe, expect, inject, it, vi } from "vitest";
import { account } from "@/lib/contracts/accounts";
import { peoplePage } from "@/lib/contracts/people";
import { listKeptMail } from "@/lib/services/mail/kept";
import { tokenOf } from "../setup/letters";
import { baseUrl, signedOut, signIn, signInAs } from "../setup/session";

const password = "herons stand in shallow water";

/** A request whose Host and forwarding headers are as given, which fetch doesn't allow. */
function bare(headers: Record<string, string>, target = "/api/v1/health"): Promise<number> {
  const { hostname, port } = new URL(baseUrl());
  return new Promise((resolve, reject) => {
    const sent = httpRequest({ hostname, port, path: target, headers }, (answer) => {
      answer.resume();
      resolve(answer.statusCode ?? 0);
    });
    sent.on("error", reject);
    sent.end();
  });
}

/** Signs up, confirms by the letter, and gives the address. */
async function newcomer(): Promise<{ email: string; handle: string }> {
  const handle = `new-${randomBytes(4).toString("hex")}`;
  const email = `${handle}@people.example`;
  const visitor = signedOut();
  expect((await visitor.send("POST", "/api/v1/account", { email, handle, password })).status).toBe(202);
  const letter = await vi.waitFor(async () => {
    const [found] = await listKeptMail(path.join(inject("server").dataFolder, "mail"), 50, email);
    if (!found) throw new Error("No letter yet.");
    return found;
  }, 20_000);
  const token = tokenOf(letter);
  // Whatever opens the letter's link without pressing the button doesn't spend it.
  expect((await visitor.fetch(`/verify?token=${token}`)).status).toBe(200);
  expect((await visitor.send("POST", "/api/v1/account/verify", { token })).status).toBe(204);
  return { email, handle };
}

describe("an account", () => {
  it("is made, confirmed by letter and signed in to; a role that the host gives ends the session", async () => {
    const { email, handle } = await newcomer();
    const member = await signIn(email, password);
    expect(account.parse(await (await member.fetch("/api/v1/account")).json())).toMatchObject({
      email,
      handle,
      role: "member",
    });
    const host = await signInAs("host");
    const list = peoplePage.parse(await (await host.fetch(`/api/v1/people?contains=${handle}`)).json());
    const personId = list.items[0]?.personId;
    const given = await host.send("PUT", `/api/v1/people/${personId}/role`, { role: "operator", was: "member" });
    expect(given.status).toBe(200);
    expect((await member.fetch("/api/v1/account")).status).toBe(401);
    expect((await host.send("PUT", `/api/v1/people/${personId}/role`, { role: "host", was: "member" })).status).toBe(
      409,
    );
  });

  it("gives the same answer to a known and an unknown address", async () => {
    const handle = () => `x-${randomBytes(4).toString("hex")}`;
    const answers = [];
    for (const email of ["member@alder.example", `${handle()}@people.example`]) {
      const visitor = signedOut();
      const up = await visitor.send("POST", "/api/v1/account", { email, handle: handle(), password });
      const reset = await visitor.send("POST", "/api/v1/account/reset", { email });
      answers.push([up.status, await up.text(), reset.status, await reset.text()]);
    }
    expect(answers[0]).toEqual(answers[1]);
  });

  it("refuses a wrong password as it refuses an unknown address", async () => {
    await expect(signIn("member@alder.example", "not this one")).rejects.toThrow(/error=CredentialsSignin/);
    await expect(signIn("nobody@alder.example", "not this one")).rejects.toThrow(/error=CredentialsSignin/);
  });
});

describe("the session's cookie", () => {
  it("is HttpOnly and SameSite=Lax, with a plain name on loopback, and holds neither address nor role", async () => {
    const visitor = signedOut();
    const { csrfToken } = (await (await visitor.fetch("/api/auth/csrf")).json()) as { csrfToken: string };
    const form = { csrfToken, email: "member@alder.example", password: "alder-bench-demo", json: "true" };
    const answer = await visitor.fetch("/api/auth/callback/credentials", {
      method: "POST",
      body: new URLSearchParams(form),
    });
    const line = answer.headers.getSetCookie().find((each) => each.startsWith("fanfold-session="));
    expect(line).toMatch(/; HttpOnly/i);
    expect(line).toMatch(/; SameSite=Lax/i);
    expect(line).toMatch(/; Path=\//i);
    expect(line).not.toMatch(/; Domain/i);
    const session = await (await visitor.fetch("/api/auth/session")).text();
    expect(session).not.toMatch(/alder|member|wrenreader/);
  });

  it("writes nothing for a page of another site", async () => {
    const member = await signInAs("member");
    const choices = { entry_state: false, questions: false, corrections: false, seasons: false, watched: false };
    const put = (headers: Record<string, string>) =>
      member.send("PUT", "/api/v1/account/mail-choices", choices, headers);
    expect((await put({ origin: "https://evil.example" })).status).toBe(403);
    expect((await put({ origin: "null" })).status).toBe(403);
    expect((await put({})).status).toBe(204);
  });
});

describe("every answer", () => {
  it("carries the policy with a fresh nonce, lets nobody frame it and sniff nothing", async () => {
    const nonces = new Set<string>();
    for (const target of ["/sign-in", "/sign-in", "/api/v1/health", "/nothing-here"]) {
      const answer = await signedOut().fetch(target);
      const policy = answer.headers.get("content-security-policy") ?? "";
      expect(policy).toContain("frame-ancestors 'none'");
      expect(policy).not.toMatch(/script-src[^;]*unsafe-(inline|eval)/);
      expect(answer.headers.get("x-content-type-options")).toBe("nosniff");
      nonces.add(/'nonce-([^']+)'/.exec(policy)?.[1] ?? "");
    }
    expect(nonces.size).toBe(4);
  });

  it("on pages with a token in their address sends no referrer", async () => {
    for (const target of ["/verify?token=x", "/verify/email?token=x", "/reset/new?token=x"]) {
      expect((await signedOut().fetch(target)).headers.get("referrer-policy")).toBe("no-referrer");
    }
  });
});

describe("the demo, whose passwords are public", () => {
  it("answers to names of this machine alone, and through no proxy", async () => {
    const { host } = new URL(baseUrl());
    expect(await bare({ host })).toBe(200);
    for (const target of ["/api/v1/health", "/sign-in", "/licences/atkinson-hyperlegible-next.txt"]) {
      expect(await bare({ host: "fans.example" }, target)).toBe(403);
      expect(await bare({ host, "x-forwarded-for": "198.51.100.7" }, target)).toBe(403);
    }
    for (const name of ["forwarded", "x-forwarded-host", "x-forwarded-proto", "x-real-ip"]) {
      expect(await bare({ host, [name]: "198.51.100.7" })).toBe(403);
    }
    const claimed = { "x-fanfold-forwarded": "0", "x-fanfold-peer": "127.0.0.1" };
    expect(await bare({ host: "fans.example", ...claimed })).toBe(403);
    expect(await bare({ host, "x-forwarded-for": "127.0.0.1", ...claimed })).toBe(403);
  });
});
