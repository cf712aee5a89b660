import { NextResponse, type NextRequest } from "next/server";
import { env } from "@/lib/env/env";
import { whyDemoRefuses } from "@/lib/http/demo-rule";
import { problem } from "@/lib/http/problem";
import { contentSecurityPolicy, securityHeaders } from "@/lib/http/security-headers";
import { isWithdrawnSheet } from "@/lib/server/reading/withdrawn";

/**
 * Stands before every request: the demo's rule, the page's nonce, the headers that every answer has, and the status of a
 * sheet of which only a stub is left, which a page can't set.
 */
export async function proxy(request: NextRequest): Promise<Response> {
  const nonce = crypto.randomUUID().replaceAll("-", "");
  const policy = contentSecurityPolicy(nonce);
  const answered = securityHeaders(request.nextUrl.pathname, policy);
  const refusal = env().FANFOLD_DEMO ? whyDemoRefuses(request.headers) : undefined;
  const response = refusal ? refuse(refusal) : await goOn(request, withNonce(request, policy));
  for (const [name, value] of Object.entries(answered)) response.headers.set(name, value);
  return response;
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

function refuse(detail: string): Response {
  return problem({ code: "forbidden", detail, requestId: crypto.randomUUID() });
}

/** Every path: files and pictures as well, since the demo's rule holds for them too. */
export const config = { matcher: "/:path*" };
