import type { CookiesOptions } from "next-auth";
import { secureCookies } from "@/lib/env/site";

/** How long a session lasts, from signing in. */
export const sessionMaxAgeS = 14 * 24 * 3600;

/** Names with `__Host-` (which asks for Secure, Path=/ and no Domain) beyond loopback, plain names on it. */
function cookieName(part: string): string {
  return `${secureCookies() ? "__Host-" : ""}fanfold-${part}`;
}

export function sessionCookieName(): string {
  return cookieName("session");
}

export function authCookies(): Partial<CookiesOptions> {
  const options = { httpOnly: true, sameSite: "lax", path: "/", secure: secureCookies() } as const;
  return {
    sessionToken: { name: sessionCookieName(), options },
    callbackUrl: { name: cookieName("callback"), options },
    csrfToken: { name: cookieName("csrf"), options },
  };
}

/** One cookie's value out of a Cookie header; undefined when it isn't there. */
export function readCookie(header: string | null, name: string): string | undefined {
  const pair = header?.split(";").find((each) => each.trimStart().startsWith(`${name}=`));
  return pair === undefined ? undefined : decodeURIComponent(pair.trim().slice(name.length + 1));
}
