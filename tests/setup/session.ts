import { inject } from "vitest";
import { demoAccounts, demoPassword } from "@/db/seeds/demo/seed-people";

/** Who asks: keeps cookies as a browser does and sends this site's Origin, without which writes are refused. */
export interface Session {
  fetch(path: string, init?: RequestInit): Promise<Response>;
  /** `fetch` with a JSON body. */
  send(method: string, path: string, body?: unknown, headers?: Record<string, string>): Promise<Response>;
  /** The Cookie header as it stands. */
  cookie(): string;
}

export const baseUrl = (): string => inject("server").baseUrl;

/** Somebody signed out. */
export function signedOut(): Session {
  const jar = new Map<string, string>();
  const cookie = (): string => [...jar].map(([name, value]) => `${name}=${value}`).join("; ");
  const session: Session = {
    cookie,
    async fetch(path, init = {}) {
      const headers = new Headers(init.headers);
      if (!headers.has("origin")) headers.set("origin", baseUrl());
      if (jar.size > 0 && !headers.has("cookie")) headers.set("cookie", cookie());
      const answer = await fetch(new URL(path, baseUrl()), { redirect: "manual", ...init, headers });
      for (const line of answer.headers.getSetCookie()) keep(jar, line);
      return answer;
    },
    send: (method, path, body, headers = {}) =>
      session.fetch(path, {
        method,
        headers: { "content-type": "application/json", ...headers },
        body: body === undefined ? undefined : JSON.stringify(body),
      }),
  };
  return session;
}

function keep(jar: Map<string, string>, line: string): void {
  const [pair = "", ...attributes] = line.split(";");
  const [name = "", ...rest] = pair.split("=");
  const value = rest.join("=");
  const over = value === "" || attributes.some((each) => /^\s*max-age=0$/i.test(each));
  if (over) jar.delete(name);
  else jar.set(name, value);
}

/** Signs in by next-auth's own form. @throws when the answer is no */
export async function signIn(email: string, password: string = demoPassword): Promise<Session> {
  const session = signedOut();
  const asked = await session.fetch("/api/auth/csrf");
  const { csrfToken } = (await asked.json()) as { csrfToken: string };
  const answer = await session.fetch("/api/auth/callback/credentials", {
    method: "POST",
    body: new URLSearchParams({ csrfToken, email, password, json: "true", callbackUrl: "/" }),
  });
  const where = answer.headers.get("location") ?? ((await answer.json()) as { url?: string }).url ?? "";
  if (!answer.ok || where.includes("error=")) throw new Error(`${email} was not let in: ${answer.status} ${where}`);
  return session;
}

export type DemoPerson = "host" | "operator" | "reviewer" | "designer" | "member";

/** Signs in as one of the demo's accounts. */
export function signInAs(who: DemoPerson): Promise<Session> {
  const account = demoAccounts.find((each) => each.email === `${who}@alder.example`);
  if (!account) throw new Error(`The demo has no ${who}.`);
  return signIn(account.email);
}
