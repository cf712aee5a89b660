import { cache } from "react";
import { cookies } from "next/headers";
import { decode } from "next-auth/jwt";
import { appDb } from "@/db/client/handles";
import { personById } from "@/db/queries/people";
import { ANONYMOUS, type Actor } from "@/lib/domain/accounts/actor";
import { requiredEnv } from "@/lib/env/env";
import { readCookie, sessionCookieName } from "./cookies";

/** Who sends this request, from the session's cookie and the person's row as it stands now. */
export async function actorFromRequest(request: Request): Promise<Actor> {
  return actorFromToken(readCookie(request.headers.get("cookie"), sessionCookieName()));
}

/** Who looks at this page, looked up once a request. Reading it makes the page rendered anew at every request. */
export const actorFromPage = cache(async (): Promise<Actor> => {
  return actorFromToken((await cookies()).get(sessionCookieName())?.value);
});

/**
 * The actor that a session's token stands for. The token only names a person and the session version that it was made
 * under: role and state come from the stored row, so a changed role, password or a closed account counts at once.
 */
export async function actorFromToken(token: string | undefined): Promise<Actor> {
  if (!token) return ANONYMOUS;
  const claims = await decode({ token, secret: requiredEnv("NEXTAUTH_SECRET") }).catch(() => null);
  if (!claims || typeof claims.personId !== "string" || typeof claims.sessionVersion !== "number") return ANONYMOUS;
  const person = await personById(appDb(), { personId: claims.personId });
  if (!person || person.closedAt || person.handle === null || person.sessionVersion !== claims.sessionVersion) {
    return ANONYMOUS;
  }
  return { personId: person.personId, handle: person.handle, role: person.role };
}
