import { createHash, randomBytes } from "node:crypto";
import type { Handle } from "@/db/client/connect";
import { insertMailToken, spendMailToken, type TokenPurpose } from "@/db/queries/mail-tokens";
import { comparableEmail } from "@/lib/domain/accounts/credentials";
import { ExpectedError } from "@/lib/domain/expected-error";

const lastsS: Record<TokenPurpose, number> = { verify: 3 * 24 * 3600, reset: 3600, change_email: 24 * 3600 };

const sha256 = (text: string) => createHash("sha256").update(text).digest("hex");

/** What stands for an account where attempts and limits are counted: its address, hashed. */
export function accountKey(email: string): string {
  return sha256(comparableEmail(email));
}

/** Makes a token of 256 random bits, keeps its hash, and gives the token, which only the mail holds. */
export async function issueToken(
  handle: Handle,
  { personId, purpose, newEmail }: { personId: string; purpose: TokenPurpose; newEmail?: string },
): Promise<string> {
  const token = randomBytes(32).toString("base64url");
  await insertMailToken(handle, {
    personId,
    purpose,
    tokenHash: sha256(token),
    lastsS: lastsS[purpose],
    ...(newEmail !== undefined && { newEmail }),
  });
  return token;
}

/**
 * Spends a token once.
 *
 * @throws ExpectedError `gone` when it is unknown, spent or has run out; which of them isn't told
 */
export async function spendToken(
  handle: Handle,
  { token, purpose }: { token: string; purpose: TokenPurpose },
): Promise<{ personId: string; newEmail: string | null }> {
  const spent = await spendMailToken(handle, { tokenHash: sha256(token), purpose });
  if (!spent) throw new ExpectedError("gone", "This link was used already or has run out. Ask for a new one.");
  return spent;
}
