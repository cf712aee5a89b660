import { ExpectedError } from "@/lib/domain/expected-error";
import { isLoopbackHost, onLoopback, siteOrigin } from "@/lib/env/site";

const reading = new Set(["GET", "HEAD", "OPTIONS"]);

/** Whether an Origin header names this site. On loopback, any name of this machine will do if the Host header agrees. */
export function isOwnOrigin(origin: string, host: string | null): boolean {
  if (origin === siteOrigin()) return true;
  if (!onLoopback() || !URL.canParse(origin)) return false;
  const parsed = new URL(origin);
  return parsed.host === host && isLoopbackHost(parsed.hostname);
}

/**
 * Refuses a write that another site may have made a browser send: a foreign Origin always; none at all only if the
 * request carries a cookie (programs send neither).
 *
 * @throws ExpectedError `forbidden`
 */
export function checkOrigin(request: Request): void {
  if (reading.has(request.method)) return;
  const origin = request.headers.get("origin");
  const own = origin === null ? !request.headers.has("cookie") : isOwnOrigin(origin, request.headers.get("host"));
  if (!own) throw new ExpectedError("forbidden", "This request doesn't come from a page of this site.");
}
