import { randomBytes } from "node:crypto";
import { createWriteStream, mkdirSync, renameSync, rmSync } from "node:fs";
import path from "node:path";
import { pipeline } from "node:stream/promises";
import { SMTPServer } from "smtp-server";

export interface MailStandIn {
  /** What SMTP_URL is set to. */
  url: string;
  close(): Promise<void>;
}

/** Larger messages are refused; the product's own have a few kilobytes. */
const sizeLimit = 5_000_000;

/**
 * An SMTP server on 127.0.0.1 that delivers nothing: it keeps each message as an .eml file, named by time so that names
 * sort by arrival.
 *
 * @param folder where messages are kept; made when missing
 * @param port 0 takes any free one
 */
export async function startMailStandIn(folder: string, port = 0): Promise<MailStandIn> {
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ["STARTTLS", "AUTH"],
    size: sizeLimit,
    logger: false,
    onData(stream, _session, callback) {
      const name = `${new Date().toISOString().replaceAll(":", "-")}-${randomBytes(3).toString("hex")}.eml`;
      const partial = path.join(folder, `.${name}.partial`);
      pipeline(stream, createWriteStream(partial, { mode: 0o600, flags: "wx" })).then(
        () => {
          if (stream.sizeExceeded) {
            rmSync(partial, { force: true });
            callback(Object.assign(new Error("message too large"), { responseCode: 552 }));
          } else {
            renameSync(partial, path.join(folder, name));
            callback();
          }
        },
        (error: Error) => {
          rmSync(partial, { force: true });
          callback(error);
        },
      );
    },
  });
  await new Promise<void>((resolve, reject) => {
    server.once("error", reject);
    server.listen(port, "127.0.0.1", () => {
      server.off("error", reject);
      resolve();
    });
  });
  // A client that breaks off is its own trouble, not the server's end.
  server.on("error", () => undefined);
  const address = server.server.address();
  if (typeof address !== "object" || address === null) throw new Error("The mail stand-in has no address.");
  return {
    url: `smtp://127.0.0.1:${address.port}`,
    close: () => new Promise((resolve) => server.close(() => resolve())),
  };
}
