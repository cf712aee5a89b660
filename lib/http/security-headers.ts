import { env } from "@/lib/env/env";
import { siteOrigin } from "@/lib/env/site";

/** Pages whose address holds a token: their address is told to nobody. */
const tokenPages = ["/verify", "/reset"];
const isTokenPage = (path: string) => tokenPages.some((page) => path === page || path.startsWith(`${page}/`));

/**
 * What a page may load: its own scripts by nonce, nothing from elsewhere, and no frame around it. Style attributes are
 * let through (the framework and charts set some); they run nothing. The development server needs eval and a socket.
 */
export function contentSecurityPolicy(nonce: string): string {
  const developing = env().NODE_ENV === "development";
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}' 'strict-dynamic'${developing ? " 'unsafe-eval'" : ""}`,
    developing ? "style-src 'self' 'unsafe-inline'" : `style-src 'self' 'nonce-${nonce}'`,
    "style-src-attr 'unsafe-inline'",
    "img-src 'self' data: blob:",
    "media-src 'self' blob:",
    "font-src 'self'",
    `connect-src 'self'${developing ? " ws:" : ""}`,
    "worker-src 'self' blob:",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join("; ");
}

/** Nothing in a served file runs, loads or is framed, even if a browser opens it in spite of all. */
export const filePolicy = "sandbox; default-src 'none'; frame-ancestors 'none'";
const isFile = (path: string) => path.startsWith("/api/v1/files/");

/** Headers of every answer, pages, files and API alike. */
export function securityHeaders(path: string, policy: string): Record<string, string> {
  return {
    "content-security-policy": isFile(path) ? filePolicy : policy,
    "x-content-type-options": "nosniff",
    "referrer-policy": isTokenPage(path) ? "no-referrer" : "strict-origin-when-cross-origin",
    "permissions-policy": "camera=(), microphone=(), geolocation=()",
    "cross-origin-opener-policy": "same-origin",
    ...(siteOrigin().startsWith("https:") && { "strict-transport-security": "max-age=31536000" }),
  };
}
