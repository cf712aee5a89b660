import { z } from "zod";
import { ROLES } from "@/lib/domain/accounts/actor";
import { handlePattern, passwordLengthMax, passwordProblem } from "@/lib/domain/accounts/credentials";
import { time } from "./base";

export const email = z
  .string()
  .trim()
  .max(254, "has more than 254 characters")
  .pipe(z.email({ error: "is no e-mail address" }));

export const handle = z
  .string()
  .trim()
  .toLowerCase()
  .regex(handlePattern, "needs 2 to 30 lower-case letters, digits or hyphens, and begins with no hyphen");

/** A password to be checked: whatever somebody types. */
const typedPassword = z.string().min(1, "is missing").max(passwordLengthMax, "is too long");

/** A password to be set. */
const newPassword = z.string().superRefine((value, context) => {
  const problem = passwordProblem(value);
  if (problem) context.addIssue({ code: "custom", message: problem });
});

const token = z.string().regex(/^[A-Za-z0-9_-]{43}$/, "is not the one of the link");

export const signUpBody = z.strictObject({ email, handle, password: newPassword });
export const emailBody = z.strictObject({ email });
export const tokenBody = z.strictObject({ token });
export const resetBody = z.strictObject({ token, password: newPassword });
export const changePasswordBody = z.strictObject({ currentPassword: typedPassword, password: newPassword });
export const changeEmailBody = z.strictObject({ email, currentPassword: typedPassword });
export const changeHandleBody = z.strictObject({ handle });
export const closeBody = z.strictObject({ currentPassword: typedPassword });
export const eraseBody = z.strictObject({ currentPassword: typedPassword, handle });

/** What a person can be told of by mail. */
export const mailTopics = ["entry_state", "questions", "corrections", "seasons", "watched"] as const;
export type MailTopic = (typeof mailTopics)[number];
export const mailChoices = z.strictObject(
  Object.fromEntries(mailTopics.map((topic) => [topic, z.boolean()])) as Record<MailTopic, z.ZodBoolean>,
);
export type MailChoices = z.infer<typeof mailChoices>;

/** One's own account, as the account page shows it. */
export const account = z.strictObject({
  personId: z.uuid(),
  email: z.string(),
  handle: z.string(),
  role: z.enum(ROLES),
  createdAt: time,
  mailChoices,
});
export type Account = z.infer<typeof account>;
