"use client";

import Link from "next/link";
import { useSignIn } from "@/lib/client/accounts";
import { loadAnew, pathAfterSignIn } from "@/lib/client/session-paths";
import { ActForm } from "./act-form";
import { emailField } from "./fields";

const fields = [
  emailField,
  { name: "password", label: "Password", type: "password", autoComplete: "current-password" },
] as const;

/** Signs in and goes where one came from; the page is loaded anew, so that it is the person's from the start. */
export function SignInForm({ to }: { to?: string }) {
  const mutation = useSignIn();
  return (
    <ActForm
      fields={fields}
      mutation={mutation}
      words="Sign in"
      busyWords="Signing in …"
      onDone={() => loadAnew(pathAfterSignIn(to))}
    >
      <p>
        <Link href="/reset">Forgotten it?</Link> · <Link href="/sign-up">Make an account</Link>
        {mutation.error?.code === "forbidden" ? (
          <>
            {" "}
            · <Link href="/verify">Send the letter again</Link>
          </>
        ) : null}
      </p>
    </ActForm>
  );
}
