"use client";

import { useMutation, useQueryClient, type UseMutationResult } from "@tanstack/react-query";
import { personItem, type PersonItem } from "@/lib/contracts/people";
import type { MailChoices } from "@/lib/contracts/accounts";
import type { Role } from "@/lib/domain/accounts/actor";
import { send, sendJson, type ApiError } from "./fetcher";
import { accountKeys, peopleKeys } from "./query-keys";
import { signIn } from "./session";

/** What a form typed, by field. */
export type Typed = Readonly<Record<string, string>>;
export type FormMutation = UseMutationResult<void, ApiError, Typed>;

/** Body fields beside those typed, such as a link's token. */
function usePost(path: string, more: Typed = {}): FormMutation {
  return useMutation<void, ApiError, Typed>({
    mutationFn: (typed) => send(path, { method: "POST", body: { ...typed, ...more } }),
  });
}

export const useSignUp = () => usePost("/api/v1/account");
export const useVerify = (token: string) => usePost("/api/v1/account/verify", { token });
export const useSendVerification = () => usePost("/api/v1/account/verification");
export const useAskForReset = () => usePost("/api/v1/account/reset");
export const useReset = (token: string) => usePost("/api/v1/account/reset/confirm", { token });
export const useConfirmEmail = (token: string) => usePost("/api/v1/account/email/confirm", { token });
export const useChangePassword = () => usePost("/api/v1/account/password");
export const useChangeEmail = () => usePost("/api/v1/account/email");
export const useCloseAccount = () => usePost("/api/v1/account/close");
export const useEraseAccount = () => usePost("/api/v1/account/erase");

export function useSignIn(): FormMutation {
  return useMutation<void, ApiError, Typed>({
    mutationFn: ({ email = "", password = "" }) => signIn({ email, password }),
  });
}

export function useChangeHandle(): FormMutation {
  return useMutation<void, ApiError, Typed>({
    mutationFn: (typed) => send("/api/v1/account", { method: "PATCH", body: typed }),
  });
}

export function useMailChoices(): UseMutationResult<void, ApiError, MailChoices> {
  const client = useQueryClient();
  return useMutation<void, ApiError, MailChoices>({
    mutationFn: (body) => send("/api/v1/account/mail-choices", { method: "PUT", body }),
    onSuccess: () => client.invalidateQueries({ queryKey: accountKeys.all }),
  });
}

export function useChangeRole(personId: string): UseMutationResult<PersonItem, ApiError, { role: Role; was: Role }> {
  const client = useQueryClient();
  return useMutation<PersonItem, ApiError, { role: Role; was: Role }>({
    mutationFn: (body) => sendJson(personItem, `/api/v1/people/${personId}/role`, { method: "PUT", body }),
    onSuccess: () => client.invalidateQueries({ queryKey: peopleKeys.all }),
  });
}
