import type { NextAuthOptions } from "next-auth";
import CredentialsProvider from "next-auth/providers/credentials";
import { secureCookies } from "@/lib/env/site";
import { requiredEnv } from "@/lib/env/env";
import { authCookies, sessionMaxAgeS } from "./cookies";
import { checkCredentials } from "./credentials";

/** Settings of next-auth for one request. A session is a signed token that names a person and a session version. */
export function authOptions({ address }: { address: string }): NextAuthOptions {
  return {
    secret: requiredEnv("NEXTAUTH_SECRET"),
    session: { strategy: "jwt", maxAge: sessionMaxAgeS },
    useSecureCookies: secureCookies(),
    cookies: authCookies(),
    pages: { signIn: "/sign-in", signOut: "/sign-in", error: "/sign-in" },
    providers: [
      CredentialsProvider({
        name: "E-mail and password",
        credentials: { email: { type: "email" }, password: { type: "password" } },
        async authorize(typed) {
          if (!typed?.email || !typed.password) return null;
          const checked = await checkCredentials({ email: typed.email, password: typed.password, address });
          if (!checked.ok) {
            // A thrown message reaches the form as `error`; null is next-auth's own word for wrong credentials.
            if (checked.why === "wrong") return null;
            throw new Error(checked.why);
          }
          return { id: checked.personId, sessionVersion: checked.sessionVersion };
        },
      }),
    ],
    callbacks: {
      jwt({ token, user }) {
        if (!user) return token;
        return { personId: user.id, sessionVersion: (user as { sessionVersion?: number }).sessionVersion };
      },
      // What /api/auth/session tells is only until when; who it is, the product's own API says.
      session: ({ session }) => ({ expires: session.expires }),
      redirect: ({ url, baseUrl }) => (url.startsWith("/") ? `${baseUrl}${url}` : baseUrl),
    },
    // Its own logger writes to the console and may quote what was typed; failures come back as statuses anyway.
    logger: { error: () => undefined, warn: () => undefined, debug: () => undefined },
  };
}
