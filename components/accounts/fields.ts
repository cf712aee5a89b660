import { passwordLengthMin } from "@/lib/domain/accounts/credentials";
import type { ActField } from "./act-form";

export const emailField: ActField = { name: "email", label: "E-mail", type: "email", autoComplete: "email" };

export const currentPasswordField: ActField = {
  name: "currentPassword",
  label: "Your password now",
  type: "password",
  autoComplete: "current-password",
};

export const newPasswordField: ActField = {
  name: "password",
  label: "New password",
  type: "password",
  autoComplete: "new-password",
  hint: `${passwordLengthMin} characters or more; a few words will do`,
};

export const handleField: ActField = {
  name: "handle",
  label: "Handle",
  autoComplete: "username",
  hint: "2 to 30 lower-case letters, digits or hyphens. Everybody sees it beside your designs.",
};
