import { signIn as nextAuthSignIn, signOut as nextAuthSignOut } from "next-auth/react";
import { ApiError } from "./fetcher";
import { loadAnew } from "./session-paths";

const words: Readonly<Record<string, string>> = {
  too_many: "There were too many tries. Wait a quarter of an hour, or set a new password.",
  not_verified: "Your address isn't confirmed yet. Open the link in the letter that was sent to it.",
};

/** Signs in. @throws ApiError that tells neither whether the address nor whether the password was wrong */
export async function signIn(typed: { email: string; password: string }): Promise<void> {
  const answer = await nextAuthSignIn("credentials", { ...typed, redirect: false }).catch(() => undefined);
  if (!answer) throw new ApiError("offline", "There is no connection. What you typed is kept; try again in a moment.");
  if (answer.ok && !answer.error) return;
  const code = answer.error === "too_many" ? "too_many" : answer.error === "not_verified" ? "forbidden" : "malformed";
  const detail = words[answer.error ?? ""] ?? "This e-mail address and this password don't belong together.";
  throw new ApiError(code, detail, [], undefined, answer.status);
}

/** Signs out and begins anew on the first page, so that nothing of the session stays in memory. */
export async function signOut(): Promise<void> {
  await nextAuthSignOut({ redirect: false });
  loadAnew("/");
}
