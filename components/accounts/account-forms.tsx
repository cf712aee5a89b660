"use client";

import {
  useChangeEmail,
  useChangeHandle,
  useChangePassword,
  useCloseAccount,
  useEraseAccount,
} from "@/lib/client/accounts";
import { loadAnew } from "@/lib/client/session-paths";
import { ActForm } from "./act-form";
import { currentPasswordField, emailField, handleField, newPasswordField } from "./fields";

const toSignIn = () => loadAnew("/sign-in");

export function ChangePasswordForm() {
  return (
    <ActForm
      fields={[currentPasswordField, newPasswordField]}
      mutation={useChangePassword()}
      words="Change the password and sign out everywhere"
      busyWords="Changing …"
      onDone={toSignIn}
    />
  );
}

export function ChangeEmailForm() {
  return (
    <ActForm
      fields={[{ ...emailField, label: "New e-mail address" }, currentPasswordField]}
      mutation={useChangeEmail()}
      words="Send a link to the new address"
      busyWords="Sending …"
      done={<p>If the address can be used, a letter with a link is on its way to it. Until then nothing changes.</p>}
    />
  );
}

export function ChangeHandleForm({ handle }: { handle: string }) {
  return (
    <ActForm
      fields={[{ ...handleField, defaultValue: handle }]}
      mutation={useChangeHandle()}
      words="Change the handle"
      busyWords="Changing …"
      onDone={() => window.location.reload()}
    />
  );
}

export function CloseForm() {
  return (
    <ActForm
      fields={[currentPasswordField]}
      mutation={useCloseAccount()}
      kind="danger"
      words="Close the account"
      busyWords="Closing …"
      onDone={toSignIn}
    />
  );
}

export function EraseForm() {
  return (
    <ActForm
      fields={[
        { ...handleField, label: "Your handle, typed out", hint: undefined, autoComplete: "off" },
        currentPasswordField,
      ]}
      mutation={useEraseAccount()}
      kind="danger"
      words="Close the account and cut my name"
      busyWords="Cutting …"
      onDone={() => loadAnew("/")}
    />
  );
}
