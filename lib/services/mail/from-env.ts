import { env, requiredEnv } from "@/lib/env/env";
import { smtpMailer, type Mailer } from "./mailer";

let kept: Mailer | undefined;

/** The mailer that the settings name. One a process. */
export function mailer(): Mailer {
  kept ??= smtpMailer(requiredEnv("SMTP_URL"), env().MAIL_FROM);
  return kept;
}
