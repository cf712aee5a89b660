import { isIP } from "node:net";
import { env } from "./env";

/** Whether a host name, without port, means this machine itself: localhost, 127.0.0.0/8 or ::1. */
export function isLoopbackHost(hostname: string): boolean {
  const bare = hostname.replace(/^\[|\]$/g, "").toLowerCase();
  if (bare === "localhost" || bare === "::1" || bare === "::ffff:127.0.0.1") return true;
  return isIP(bare) === 4 && bare.startsWith("127.");
}

/** The scheme, host and port that people type, without a slash at the end; this machine's own where nothing is set. */
export function siteOrigin(): string {
  const { NEXTAUTH_URL, PORT } = env();
  return NEXTAUTH_URL ? new URL(NEXTAUTH_URL).origin : `http://127.0.0.1:${PORT}`;
}

/** Cookies are Secure and carry the `__Host-` prefix everywhere but on plain HTTP over loopback. */
export function secureCookies(): boolean {
  const { protocol, hostname } = new URL(siteOrigin());
  return protocol === "https:" || !isLoopbackHost(hostname);
}

/** Whether the site is served to this machine alone. */
export function onLoopback(): boolean {
  return isLoopbackHost(new URL(siteOrigin()).hostname);
}
