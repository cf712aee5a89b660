"use client";

import Link from "next/link";
import {
  useAskForReset,
  useConfirmEmail,
  useReset,
  useSendVerification,
  useSignUp,
  useVerify,
} from "@/lib/client/accounts";
import { ActForm } from "./act-form";
import { emailField, handleField, newPasswordField } from "./fields";

const signIn = <Link href="/sign-in">Sign in</Link>;

/** Makes an account; the letter that comes decides whether it is one's own address. */
export function SignUpForm() {
  return (
    <ActForm
      fields={[emailField, handleField, { ...newPasswordField, label: "Password" }]}
      mutation={useSignUp()}
      words="Make the account"
      busyWords="Making it …"
      done={<p>A letter is on its way to that address. Open its link within three days and press the button there.</p>}
    />
  );
}

/** Sends the confirming letter again. */
export function SendVerificationForm() {
  return (
    <ActForm
      fields={[emailField]}
      mutation={useSendVerification()}
      words="Send the letter again"
      busyWords="Sending …"
      done={<p>If an account waits for this address to be confirmed, a letter is on its way.</p>}
    />
  );
}

/** The button behind a letter's link: opening the page alone does nothing. */
export function VerifyForm({ token }: { token: string }) {
  return (
    <ActForm
      fields={[]}
      mutation={useVerify(token)}
      words="Confirm this address"
      busyWords="Confirming …"
      done={<p>Your address is confirmed. {signIn}.</p>}
    />
  );
}

export function ConfirmEmailForm({ token }: { token: string }) {
  return (
    <ActForm
      fields={[]}
      mutation={useConfirmEmail(token)}
      words="Use this address"
      busyWords="Changing …"
      done={<p>Your account has the new address now.</p>}
    />
  );
}

export function AskForResetForm() {
  return (
    <ActForm
      fields={[emailField]}
      mutation={useAskForReset()}
      words="Send the link"
      busyWords="Sending …"
      done={<p>If there is an account with this address, a letter with a link is on its way. It works for one hour.</p>}
    />
  );
}

export function ResetForm({ token }: { token: string }) {
  return (
    <ActForm
      fields={[newPasswordField]}
      mutation={useReset(token)}
      words="Set the password"
      busyWords="Setting …"
      done={<p>The password is set, and whoever was signed in isn&apos;t any more. {signIn}.</p>}
    />
  );
}
