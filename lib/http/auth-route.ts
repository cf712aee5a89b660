import { randomUUID } from "node:crypto";
import { NextRequest } from "next/server";
import { handleAuth, type AuthContext } from "@/lib/auth/handler";
import { ExpectedError } from "@/lib/domain/expected-error";
import { clientAddress } from "./address";
import { readBytes } from "./body";
import { answerFailure } from "./failure";
import { checkOrigin } from "./origin";

/** The same gate as every route's, before next-auth sees the request: origin, kind and size. */
export async function authRoute(request: NextRequest, context: AuthContext): Promise<Response> {
  const requestId = randomUUID();
  try {
    checkOrigin(request);
    const response = await handleAuth(await readWhole(request), context, clientAddress(request.headers));
    response.headers.set("cache-control", "private, no-store");
    return response;
  } catch (error) {
    return answerFailure(error, { method: request.method, path: request.nextUrl.pathname, requestId });
  }
}

async function readWhole(request: NextRequest): Promise<NextRequest> {
  if (request.method === "GET" || request.method === "HEAD") return request;
  const kind = request.headers.get("content-type")?.split(";")[0]?.trim().toLowerCase();
  if (kind !== "application/x-www-form-urlencoded") {
    throw new ExpectedError("wrong_kind", "Send the form as application/x-www-form-urlencoded.");
  }
  const body = await readBytes(request, 16 * 1024);
  return new NextRequest(request.url, { method: request.method, headers: request.headers, body });
}
