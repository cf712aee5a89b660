import { execFile } from "node:child_process";
import { rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import type { Locator, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { benchSession, sessionList, type BenchSession } from "@/lib/contracts/bench-session";
import { soundReport, type SoundReportView } from "@/lib/contracts/sound-report";
import { formatNumber } from "@/lib/format/numbers";
import { sameSubject } from "@/lib/domain/bench/next-run";
import { calibratorWav, fanWav } from "../factories/recordings";
import { setUpBrowser } from "../setup/browser";
import { signInAs } from "../setup/session";
import { temporaryFolder } from "../setup/temporary-folder";
import { scrollsSidewaysBy, wrongsByAxe } from "./support/axe";

const browser = setUpBrowser();
const folder = temporaryFolder("recordings-preview");
afterAll(() => rmSync(folder, { recursive: true, force: true }));

const tones = [
  [169.2, 50],
  [338.4, 44],
  [700, 46],
] as const;
const bytes = fanWav({ tones, bangAtS: 4, encoding: { encoding: "int", bits: 24, extensible: true } });
let session: BenchSession;

beforeAll(async () => {
  const operator = await signInAs("operator");
  const list = sessionList.parse(await (await operator.fetch("/api/v1/bench/sessions?open=true")).json());
  session = benchSession.parse(await (await operator.fetch(`/api/v1/bench/sessions/${list.items[0]?.id}`)).json());
});

/** The same file through `npm run read -- sound`. */
function commandLine(): Promise<SoundReportView> {
  const file = path.join(folder, "run.wav");
  writeFileSync(file, bytes);
  const args = [file, "--full-scale", "120", "--blades", "7", "--rpm", "1450", "--struts", "4"];
  return new Promise((resolve, reject) => {
    execFile(process.execPath, ["--import", "tsx", "lib/cli/read.ts", "sound", ...args], (error, out) =>
      error ? reject(error) : resolve(soundReport.parse(JSON.parse(out))),
    );
  });
}

/** Opens the first run of the session's first subject and the fold in which its recording is brought. */
async function openForm(page: Page): Promise<Locator> {
  await page.goto(`/bench/sessions/${session.id}`);
  const [subject] = session.subjects;
  const run = session.runs.find((each) => each.state !== "discarded" && subject && sameSubject(each, subject));
  const cell = page.getByRole("button", {
    name: `${subject?.name}, mount ${run?.mountNumber} at ${run?.setSpeed}`,
  });
  // A press counts once the page's scripts run.
  await vi.waitFor(
    async () => {
      if ((await cell.getAttribute("aria-expanded")) !== "true") await cell.click();
      await page.getByRole("button", { name: "Close this run" }).waitFor({ timeout: 1000 });
    },
    { timeout: 60_000, interval: 200 },
  );
  await page.locator("#runs summary", { hasText: "Bring a recording (WAV)" }).click();
  return page.locator("#runs details[open]", { hasText: "Bring a recording (WAV)" });
}

const digits = (value: number | null): string | undefined =>
  value === null ? undefined : formatNumber(value, { decimals: 1 });
const cellsOf = async (table: Locator): Promise<string[][]> =>
  Promise.all((await table.locator("tbody tr").all()).map((row) => row.locator("th, td").allInnerTexts()));

describe("a recording that is read in the browser before it is sent", () => {
  it("says what the command line says, digit by digit, and sends nothing", async () => {
    const { page, complaints } = await browser.open({ as: "operator" });
    const form = await openForm(page);
    const asked: string[] = [];
    page.on("request", (request) => {
      if (request.method() !== "GET") asked.push(`${request.method()} ${request.url()}`);
    });
    await form
      .getByLabel("Recording (WAV)")
      .setInputFiles({ name: "run.wav", mimeType: "audio/wav", buffer: Buffer.from(bytes) });
    await form.getByLabel("Level is told by").selectOption("full-scale");
    await form.getByLabel("Background").selectOption("");
    await form.getByRole("textbox", { name: "Level at an rms of 1" }).fill("120");
    await form.getByRole("textbox", { name: "Blades" }).fill("7");
    await form.getByRole("textbox", { name: "Speeds by tachometer" }).fill("1450");
    await form.getByRole("textbox", { name: "Struts" }).fill("4");
    await form.getByRole("button", { name: "Read it here" }).click();
    await form.getByText("Read in this browser; nothing is sent yet.").waitFor({ timeout: 60_000 });

    const report = await commandLine();
    const facts = (await form.locator("dl").first().innerText()).replace(/\s+/g, " ");
    expect(facts).toContain(`${report.levelADba?.toFixed(1)} dB(A) @`);
    expect(facts).toContain(`${report.levelCDb?.toFixed(1)} dB(C)`);
    expect(facts).toContain(`${report.levelZDb?.toFixed(1)} dB`);
    expect(facts).toContain(`${report.loudness?.sone.toFixed(2)} sone`);
    expect(facts).toContain(`${report.speedsRpm?.[0]?.toFixed(0)} rpm`);
    expect(await form.innerText()).toContain("11.0 of 12.0 s are used. Left out: 4 to 5 s.");
    const found = await cellsOf(form.getByRole("table", { name: "Tones found" }));
    expect(found.map((cells) => cells.slice(0, 4))).toEqual(
      report.tones.map((tone) => [tone.frequencyHz, tone.levelDb, tone.toneToNoiseDb, tone.prominenceDb].map(digits)),
    );
    // As the file was made: its tones, by frequency and level.
    expect(report.tones.map((tone) => Math.round(tone.frequencyHz))).toEqual(tones.map(([hz]) => Math.round(hz)));
    await form.getByText("The same figures as a table").click();
    const bands = await cellsOf(form.getByRole("table", { name: "Third-octave bands, the chart’s figures" }));
    expect(bands.map((cells) => cells[1])).toEqual(report.bands.map(({ levelDb }) => digits(levelDb)));
    expect(asked).toEqual([]);
    expect(complaints).toEqual([]);
    expect(await wrongsByAxe(page)).toEqual([]);
  });

  it("is refused with the reason, on a telephone, without scrolling sideways", async () => {
    const { page } = await browser.open({ as: "operator", width: 360 });
    const form = await openForm(page);
    const cut = { name: "cut.wav", mimeType: "audio/wav", buffer: Buffer.from(bytes.slice(0, 90_000)) };
    await form.getByLabel("Recording (WAV)").setInputFiles(cut);
    await form.getByLabel("Level is told by").selectOption("full-scale");
    await form.getByRole("textbox", { name: "Level at an rms of 1" }).fill("120");
    await form.getByRole("button", { name: "Read it here" }).click();
    const refusal = form.getByRole("alert");
    await refusal.waitFor({ timeout: 60_000 });
    expect(await refusal.innerText()).toMatch(/truncated.*Nothing was sent/s);
    expect(await scrollsSidewaysBy(page)).toBe(0);
  });
});

/** Brings a recording to a desk, reads it here, sends it, waits until the server has read it too, and keeps it. */
async function bringAndKeep(desk: Locator, file: { name: string; bytes: Uint8Array; reason?: string }): Promise<void> {
  const form = desk.locator("details", { hasText: "Bring a recording (WAV)" }).last();
  if ((await form.getAttribute("open")) === null) await form.locator("summary").first().click();
  const given = { name: file.name, mimeType: "audio/wav", buffer: Buffer.from(file.bytes) };
  await form.getByLabel("Recording (WAV)").setInputFiles(given);
  await form.getByRole("button", { name: "Read it here" }).click();
  await form.getByRole("button", { name: "Send it to be kept" }).click({ timeout: 60_000 });
  const keep = desk.getByRole("button", { name: new RegExp(`^Keep .* from ${file.name}$`) });
  await keep.waitFor({ timeout: 60_000 });
  if (file.reason !== undefined) await desk.getByLabel(/^Reason to supersede .* dB\(A\)/).fill(file.reason);
  await keep.click();
  await desk.getByText(new RegExp(`^${file.name}, on axis, .*, kept$`)).waitFor();
}

describe("recordings that are kept at the bench", () => {
  it("tell the calibrator's drift, stand for a typed level with a reason, and are released by who listened", async () => {
    const { page, complaints } = await browser.open({ as: "operator" });
    await openForm(page);
    const name = (what: string) => `${what}-${Date.now()}.wav`;
    const [before, run, after] = [name("before"), name("run"), name("after")];
    const deskOf = (heading: string) =>
      page.getByRole("heading", { name: heading, exact: true }).locator("xpath=parent::*");
    await bringAndKeep(deskOf("Calibrator before"), { name: before, bytes: calibratorWav() });
    const runs = page.locator("#runs");
    await bringAndKeep(runs, { name: run, bytes: fanWav({ tones }), reason: "The meter was read too early." });
    await runs.getByText("The meter was read too early.").first().waitFor();
    await runs.getByRole("checkbox", { name: new RegExp(`^I listened to all of ${run}`) }).click({ force: true });
    await runs
      .getByText(/^Listened to by \S+, .*: no voices\. It may be published\.$/)
      .last()
      .waitFor();

    // 94.8 dB after 94 dB before: 0.8 dB, above the protocol's 0.5 dB (by hand).
    await bringAndKeep(deskOf("Calibrator after"), { name: after, bytes: calibratorWav({ levelDb: 94.8 }) });
    await page.locator("#after").getByText("it moved by +0.80 dB; the limit is 0.5 dB").waitFor();
    await page.locator("#end").getByText("The calibrator moved by 0.8 dB").first().waitFor();
    expect(complaints).toEqual([]);
    expect(await wrongsByAxe(page)).toEqual([]);
  });
});
