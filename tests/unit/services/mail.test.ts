import { readdirSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { afterEach, beforeEach, expect, test } from "vitest";
import { listKeptMail, readKeptMail } from "@/lib/services/mail/kept";
import { smtpMailer, type Mailer } from "@/lib/services/mail/mailer";
import { startMailStandIn, type MailStandIn } from "@/lib/services/mail/stand-in";
import { temporaryFolder } from "@/tests/setup/temporary-folder";

let folder: string;
let server: MailStandIn;
let mailer: Mailer;

beforeEach(async () => {
  folder = temporaryFolder("mail");
  server = await startMailStandIn(path.join(folder, "mail"));
  mailer = smtpMailer(server.url, "Fanfold <no-reply@alder.example>");
});
afterEach(async () => {
  mailer.close();
  await server.close();
  rmSync(folder, { recursive: true, force: true });
});
const kept = () => path.join(folder, "mail");

test("a message that is sent is kept and read back, letters beyond ASCII and long lines whole", async () => {
  await mailer.ready();
  const text = `Grüße, ΔT 12,5 K\n\n${"https://127.0.0.1/confirm?token=".padEnd(200, "x")}\n.\nend`;
  await mailer.send({ to: "marl@alder.example", subject: "Bestätigen ✓", text });
  const [mail] = await listKeptMail(kept());
  expect(mail).toMatchObject({
    from: "no-reply@alder.example",
    to: ["marl@alder.example"],
    subject: "Bestätigen ✓",
    text,
  });
  expect(await readKeptMail(kept(), mail?.id ?? "")).toEqual(mail);
});

test("messages are listed newest first, by receiver, up to a limit", async () => {
  for (const to of ["a@alder.example", "b@alder.example", "a@alder.example"]) {
    await mailer.send({ to, subject: to, text: "x" });
  }
  expect((await listKeptMail(kept(), 2)).length).toBe(2);
  expect((await listKeptMail(kept(), 9, "A@alder.example")).map((each) => each.to)).toEqual([
    ["a@alder.example"],
    ["a@alder.example"],
  ]);
  const names = readdirSync(kept()).sort();
  expect((await listKeptMail(kept())).map((each) => `${each.id}.eml`)).toEqual(names.toReversed());
});

test("line breaks in an address or subject can't add a header", async () => {
  await mailer.send({ to: "a@alder.example", subject: "x\r\nBcc: c@alder.example", text: "x" });
  const [mail] = await listKeptMail(kept());
  expect(mail?.to).toEqual(["a@alder.example"]);
  expect(mail?.subject).toContain("Bcc");
});

test("an id that climbs out of the folder finds nothing", async () => {
  writeFileSync(path.join(folder, "secret.eml"), "Subject: secret\n\nx");
  expect(await readKeptMail(kept(), "../secret")).toBeUndefined();
  expect(await listKeptMail(path.join(folder, "nowhere"))).toEqual([]);
});

test("a server that is gone is an error to the sender", async () => {
  await server.close();
  await expect(mailer.send({ to: "a@alder.example", subject: "x", text: "x" })).rejects.toThrow();
  await expect(mailer.ready()).rejects.toThrow();
});
