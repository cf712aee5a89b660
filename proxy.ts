import { NextResponse, type NextRequest } from "next/server";
import { env } from "@/lib/env/env";
import { whyDemoRefuses } from "@/lib/http/demo-rule";
import { problem } from "@/lib/http/problem";
import { contentSecurityPolicy, securityHeaders } from "@/lib/http/security-headers";

/** Stands before every request: the demo's rule, the page's nonce, the headers that every answer has. */
export function proxy(request: NextRequest): Response {
  const nonce = crypto.randomUUID().replaceAll("-", "");
  const policy = contentSecurityPolicy(nonce);
  const answered = securityHeaders(request.nextUrl.pathname, policy);
  const refusal = env().FANFOLD_DEMO ? whyDemoRefuses(request.headers) : undefined;
  const response = refusal ? refuse(refusal) : NextResponse.next({ request: { headers: withNonce(request, policy) } });
  for (const [name, value] of Object.entries(answered)) response.headers.set(name, value);
  return response;
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
