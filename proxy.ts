import { NextResponse, type NextRequest } from "next/server";
import { env } from "@/lib/env/env";
import { whyDemoRefuses } from "@/lib/http/demo-rule";
import { problem } from "@/lib/http/problem";
import { contentSecurityPolicy, securityHeaders } from "@/lib/http/security-headers";
import { isWithdrawnSheet } from "@/lib/server/reading/withdrawn";

/**
 * Stands before every request: what is let in, the page's nonce, the headers that every answer has, and the status of a
 * sheet of which only a stub is left, which a page can't set.
 */
export async function proxy(request: NextRequest): Promise<Response> {
  const nonce = crypto.randomUUID().replaceAll("-", "");
  const policy = contentSecurityPolicy(nonce);
  const answered = securityHeaders(request.nextUrl.pathname, policy);
  const response = refused(request) ?? (await goOn(request, withNonce(request, policy)));
  for (const [name, value] of Object.entries(answered)) response.headers.set(name, value);
  return response;
}

/** What no route needs to see: what the demo doesn't let in, and addresses that can name nothing. */
function refused({ headers, nextUrl }: NextRequest): Response | undefined {
  const requestId = crypto.randomUUID();
  const refusal = env().FANFOLD_DEMO ? whyDemoRefuses(headers) : undefined;
  if (refusal) return problem({ code: "forbidden", detail: refusal, requestId });
  if (!isReadable(nextUrl.pathname)) return problem({ code: "not_found", detail: "There is no such page.", requestId });
  if (nextUrl.search.includes("%00")) {
    return problem({ code: "malformed", detail: "The address holds a NUL, which nothing here can.", requestId });
  }
  return undefined;
}

/** Whether an address is UTF-8, percent-encoded (RFC 3986, 2.5), and holds no NUL, which no name in a database can. */
function isReadable(pathname: string): boolean {
  try {
    return !decodeURIComponent(pathname).includes("\0");
  } catch {
    return false;
  }
}

/** On to the page; the status set here is the one that it answers with. */
async function goOn(request: NextRequest, headers: Headers): Promise<Response> {
  const gone = await isWithdrawnSheet(request.nextUrl.pathname);
  return NextResponse.next({ request: { headers }, ...(gone && { status: 410 }) });
}

/** The framework reads the nonce for its own scripts out of the request's policy. */
function withNonce(request: NextRequest, policy: string): Headers {
  const headers = new Headers(request.headers);
  headers.set("content-security-policy", policy);
  return headers;
}

/** Every path: files and pictures as well, since the demo's rule holds for them too. */
export const config = { matcher: "/:path*" };
