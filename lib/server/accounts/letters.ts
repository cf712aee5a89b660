import { siteOrigin } from "@/lib/env/site";
import { mailer } from "@/lib/services/mail/from-env";
import { log } from "../log";

export interface Letter {
  to: string;
  subject: string;
  lines: readonly string[];
}

/**
 * Hands a letter to the mail server without waiting: the answer to a request must take the same time whether or not
 * there is somebody to write to. A letter that fails is logged, without its address; its reader can ask again.
 */
export function post({ to, subject, lines }: Letter): Promise<void> {
  return mailer()
    .send({ to, subject, text: `${lines.join("\n\n")}\n` })
    .then(
      () => undefined,
      (error: unknown) => log().error({ err: error, subject }, "letter not sent"),
    );
}

const link = (path: string, token: string) => `${siteOrigin()}${path}?token=${token}`;
const ignore = "If that wasn't you, do nothing: without the link nothing happens.";

export const verifyLetter = (to: string, token: string): Letter => ({
  to,
  subject: "Confirm your address for Fanfold",
  lines: [
    "Somebody, probably you, made an account on Fanfold with this address.",
    `Open this page and press the button on it, within three days:\n${link("/verify", token)}`,
    ignore,
  ],
});

export const knownLetter = (to: string): Letter => ({
  to,
  subject: "You have an account on Fanfold already",
  lines: [
    "Somebody, probably you, tried to make an account on Fanfold with this address. There is one already.",
    `If you forgot its password, set a new one here:\n${siteOrigin()}/reset`,
    "If that wasn't you, do nothing.",
  ],
});

export const resetLetter = (to: string, token: string): Letter => ({
  to,
  subject: "Set a new password for Fanfold",
  lines: [
    "Somebody, probably you, asked to set a new password.",
    `Open this page within one hour:\n${link("/reset/new", token)}`,
    ignore,
  ],
});

export const changedPasswordLetter = (to: string): Letter => ({
  to,
  subject: "Your password for Fanfold was changed",
  lines: [
    "The password of your account was changed, and everything that was signed in was signed out.",
    `If that wasn't you, set a new one at once:\n${siteOrigin()}/reset`,
  ],
});

export const newAddressLetter = (to: string, token: string): Letter => ({
  to,
  subject: "Confirm your new address for Fanfold",
  lines: [
    "Somebody, probably you, wants to use this address for an account on Fanfold.",
    `Open this page and press the button on it, within one day:\n${link("/verify/email", token)}`,
    ignore,
  ],
});

export const oldAddressLetter = (to: string): Letter => ({
  to,
  subject: "Another address was asked for on Fanfold",
  lines: [
    "Somebody signed in to your account, probably you, asked to use another address for it. A link went to that address.",
    `If that wasn't you, set a new password at once:\n${siteOrigin()}/reset`,
  ],
});
