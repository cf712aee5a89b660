import nodemailer from "nodemailer";

export interface Message {
  to: string;
  subject: string;
  text: string;
  html?: string;
}

export interface Mailer {
  /** Hands the message to the server; gives its Message-ID. Throws when the server doesn't take it. */
  send(message: Message): Promise<string>;
  /** Resolves when the server answers, else throws. */
  ready(): Promise<void>;
  close(): void;
}

/**
 * Mail over SMTP.
 *
 * @param url smtp:// or smtps://, with name and password where the server wants them
 * @param from the sender, as `Name <address>`
 */
export function smtpMailer(url: string, from: string): Mailer {
  // One server that hangs holds up nobody else for long.
  const waits = { connectionTimeout: 10_000, greetingTimeout: 10_000, socketTimeout: 30_000 };
  const transport = nodemailer.createTransport({ url, ...waits }, { from });
  return {
    async send({ to, subject, text, html }) {
      const sent = await transport.sendMail({
        to,
        subject,
        text,
        html,
        disableFileAccess: true,
        disableUrlAccess: true,
      });
      return sent.messageId;
    },
    async ready() {
      await transport.verify();
    },
    close: () => transport.close(),
  };
}
