import type { Page } from "playwright-core";

/** What an operator does at the session's screen, by the names that the screen gives its fields and buttons. */
export function benchHand(page: Page) {
  const cell = (subject: string, mount: number, setSpeed: number) =>
    page.getByRole("button", { name: new RegExp(`^${subject}.*, mount ${mount} at ${setSpeed}\\b`) });
  const done = () => page.getByRole("button", { name: "Run is done" });

  return {
    async tickAndStart(roundName: string): Promise<void> {
      await page.goto("/bench");
      const round = page.getByLabel("Round", { exact: true });
      await round.selectOption({ label: roundName });
      const slots = page.getByRole("group", { name: "Before the session starts" }).getByRole("checkbox");
      for (const slot of await slots.all()) await slot.check({ force: true });
      await page.getByRole("button", { name: "Start session" }).click();
      await page.waitForURL(/\/bench\/sessions\//);
    },
    async calibrator(phase: "before" | "after", typed: string): Promise<void> {
      await page.getByRole("textbox", { name: `Calibrator ${phase}, on axis` }).fill(typed);
      const kept = page.waitForResponse(
        (answer) => answer.url().endsWith("/readings") && answer.request().method() === "POST",
      );
      await page.getByRole("button", { name: `Keep reading: calibrator ${phase}, on axis` }).click();
      await kept;
    },
    async background(typed: string): Promise<void> {
      await page.getByRole("textbox", { name: "Background level" }).fill(typed);
      const kept = page.waitForResponse(
        (answer) => answer.url().endsWith("/readings") && answer.request().method() === "POST",
      );
      await page.getByRole("button", { name: "Keep reading: background" }).click();
      await kept;
    },
    /** Opens a run's cell and keeps what is typed; `temperature` is left to a log when null. */
    async run(
      subject: string,
      mount: number,
      setSpeed: number,
      typed: { level: string; power: string; rpm: string; sensor?: string; ambient?: string },
    ): Promise<void> {
      await cell(subject, mount, setSpeed).click();
      await page.getByRole("textbox", { name: "Level on axis" }).fill(typed.level);
      await page.getByRole("textbox", { name: "Heater power" }).fill(typed.power);
      await page.getByRole("textbox", { name: "Speed of rotor 1" }).fill(typed.rpm);
      if (typed.sensor) await page.getByRole("textbox", { name: "Sensor temperature" }).fill(typed.sensor);
      if (typed.ambient) await page.getByRole("textbox", { name: "Ambient temperature" }).fill(typed.ambient);
      await page.getByRole("button", { name: "Add run" }).click();
      await done().waitFor();
    },
    /** Brings a CSV log to the run that is open. @returns what the report says of refused rows */
    async log(name: string, csv: string): Promise<string> {
      await page.getByText("Bring a log (CSV)").click();
      await page.getByLabel("CSV log").setInputFiles({ name, mimeType: "text/csv", buffer: Buffer.from(csv) });
      await page.getByRole("button", { name: "Read the log" }).click();
      const keep = page.getByRole("button", { name: "Columns are right: keep the log" });
      await keep.waitFor();
      const refused = page.getByText(/refused rows/);
      const said = (await refused.count()) > 0 ? await refused.first().innerText() : "";
      const kept = page.waitForResponse((answer) => answer.url().includes("commit=yes"));
      await keep.click();
      if (!(await kept).ok()) throw new Error(`the log ${name} was not kept: ${await (await kept).text()}`);
      return said;
    },
    async finish(): Promise<void> {
      const answered = page.waitForResponse((answer) => answer.url().endsWith("/state"));
      await done().click();
      await answered;
      await page.getByRole("button", { name: "Close this run" }).click();
    },
    async end(): Promise<void> {
      await page.getByRole("button", { name: "End session" }).click();
      const ended = page.waitForResponse((answer) => answer.url().endsWith("/end"));
      await page.getByRole("button", { name: "End it now" }).click();
      await ended;
      await page.getByText("Nothing was found").waitFor();
    },
    async toReview(names: readonly string[], roundName: string): Promise<void> {
      for (const name of names) {
        const moved = page.waitForResponse((answer) => answer.url().endsWith("/moves"));
        await page.getByRole("button", { name: new RegExp(`^To review: ${name}`) }).click();
        const answer = await moved;
        if (!answer.ok()) throw new Error(`${name} did not go to review: ${await answer.text()}`);
      }
      await page.goto("/bench");
      const round = page.getByRole("button", { name: new RegExp(`^Round to review: ${roundName}`) });
      await round.click();
      await round.waitFor({ state: "hidden" });
    },
  };
}
