"use client";

import { useMutation } from "@tanstack/react-query";
import { signOut } from "@/lib/client/session";

/** Signs out; stands in the account's menu. */
export function SignOutButton() {
  const mutation = useMutation({ mutationFn: signOut });
  return (
    <button type="button" aria-disabled={mutation.isPending} onClick={() => !mutation.isPending && mutation.mutate()}>
      {mutation.isPending ? "Signing out …" : mutation.isError ? "Try again to sign out" : "Sign out"}
    </button>
  );
}
