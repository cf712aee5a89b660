import NextAuth from "next-auth";
import type { NextRequest } from "next/server";
import { authOptions } from "./options";

export type AuthContext = { params: Promise<{ nextauth: string[] }> };

/** next-auth's own routes: the token against forged requests, signing in and out. */
export async function handleAuth(request: NextRequest, context: AuthContext, address: string): Promise<Response> {
  return (await NextAuth(request, context, authOptions({ address }))) as Response;
}
