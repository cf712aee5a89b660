import { describe, expect, it, vi } from "vitest";
import { formatNumber } from "@/lib/format/numbers";
import { setUpBrowser } from "../setup/browser";
import { temperatureLog } from "./support/bench-logs";
import { baselineDeltaTK, ratioAtEqualNoise, type Point } from "./support/by-hand";
import { benchHand } from "./support/bench-hand";
import { stageRound } from "./support/stage-round";

const browser = setUpBrowser();
const ambientC = 22.4;
const backgroundDba = 28;
const headlineDba = 46;
const speeds = [800, 1200, 1800];

/** What stands on the bench: levels as a meter shows them, and the rises that the heater's log will show. */
const baseline = { levels: [38, 45.5, 53], rises: [74, 63, 56] };
const first = { levels: [37.2, 44.4, 52.2], rises: [70.5, 60.8, 54.2] };
const second = { levels: [38.6, 46.2, 53.9], rises: [73, 63.5, 56.5] };

const comma = (value: number, digits = 1): string => value.toFixed(digits).replace(".", ",");
const points = (of: { levels: number[] }, rises: readonly number[], powers = [150, 150, 150]): Point[] =>
  of.levels.map((levelReadDba, i) => ({ levelReadDba, deltaTK: rises[i] ?? NaN, powerW: powers[i] ?? NaN }));

describe("a whole round", () => {
  it(
    "goes from loggers' files to a comparison whose figures an independent calculation gives",
    { timeout: 600_000 },
    async () => {
      const staged = await stageRound();
      const [one, other] = staged.entries;
      const roundName = `${staged.seasonTitle}, round 1`;
      const { page, complaints } = await browser.open({ as: "operator" });
      const hand = benchHand(page);

      await hand.tickAndStart(roundName);
      await hand.calibrator("before", "94,0");
      await hand.background(comma(backgroundDba));
      const typed = async (subject: string, of: typeof baseline, mount: number) => {
        for (const [i, speed] of speeds.entries()) {
          await hand.run(subject, mount, speed, {
            level: comma(of.levels[i] ?? NaN),
            power: "150",
            rpm: String(speed + 3),
            sensor: `${(ambientC + (of.rises[i] ?? NaN)).toFixed(1)} °C`,
            ambient: comma(ambientC),
          });
          await hand.finish();
        }
      };
      await typed("Baseline Plain seven", baseline, 1);

      const writers = ["semicolon and comma", "fahrenheit", "gap and text row"] as const;
      const logged: number[] = [];
      const sent: string[] = [];
      for (const [i, speed] of speeds.entries()) {
        const writer = writers[i] ?? "fahrenheit";
        const log = temperatureLog(writer, { deltaTK: first.rises[i] ?? NaN, ambientC, seed: 11 + i });
        logged.push(log.meanDeltaTK);
        sent.push(log.csv);
        await hand.run(one.name, 1, speed, { level: comma(first.levels[i] ?? NaN), power: "150", rpm: String(speed) });
        const refused = await hand.log(`${speed}.csv`, log.csv);
        if (writer === "gap and text row") expect(refused).toMatch(/^1 refused row/);
        else expect(refused).toBe("");
        await hand.finish();
      }
      await typed(other.name, second, 1);
      await page.getByRole("button", { name: /^Add a mount of Baseline Plain seven/ }).click();
      await typed("Baseline Plain seven", baseline, 2);
      await hand.calibrator("after", "94,1");
      await hand.end();
      const sessionPath = new URL(page.url()).pathname;
      await hand.toReview([one.name, other.name], roundName);

      // Nothing of it shows to anybody before the hour.
      const reader = await browser.open();
      expect((await reader.page.goto(`/designs/${one.slug}`))?.status()).toBe(404);

      // The reviewer sends the second entry back once: its heater power was read wrongly at the lowest speed.
      const reviewer = await browser.open({ as: "reviewer" });
      await reviewer.page.goto(`/review/${staged.roundId}`);
      await reviewer.page
        .getByRole("checkbox", { name: new RegExp(`^Send back ${other.name}`) })
        .check({ force: true });
      await reviewer.page
        .getByLabel(new RegExp(`^Reason for ${other.name}`))
        .fill("The heater's power at 800 rpm looks off.");
      await reviewer.page.getByLabel("What is wrong").fill("Look at one power again.");
      await pressAndWait(reviewer.page, "Send back", "/send-back");

      await page.goto(sessionPath);
      await page.getByRole("button", { name: new RegExp(`^${other.name}.*, mount 1 at 800\\b`) }).click();
      await page.getByRole("button", { name: /^Supersede .*power.*150 W/i }).click();
      await page.getByLabel(/instead$/).fill("148,5");
      await page.getByLabel("Reason to supersede").fill("Read off the wrong line.");
      await pressAndWait(page, "Supersede reading", "/supersede");
      await page.reload();
      await hand.toReview([other.name], roundName);

      await reviewer.page.goto(`/review/${staged.roundId}`);
      await pressAndWait(reviewer.page, "Sign the round", "/sign");
      const host = await browser.open({ as: "host" });
      await host.page.goto(`/host/rounds/${staged.roundId}`);
      await pressAndWait(host.page, "Publish now", "/publish");
      await vi.waitFor(async () => expect((await reader.page.goto(`/designs/${one.slug}`))?.status()).toBe(200), {
        timeout: 150_000,
        interval: 2_000,
      });

      // Everybody may check: the logs behind the figures are there as they were received.
      const received: string[] = [];
      for (const speed of speeds) {
        const fold = reader.page.getByText(new RegExp(`^${formatNumber(speed)} rpm: .* of this design`));
        await fold.click();
        const log = reader.page.getByRole("link", { name: "Temperature log, this design, mount 1" });
        await log.waitFor();
        received.push(await (await reader.page.request.get((await log.getAttribute("href")) ?? "")).text());
        await fold.click();
      }
      expect(received).toEqual(sent);

      // By hand: the same readings, formulas of their own. The baseline's two mounts read the same, so their mean is either.
      const below = points(baseline, baseline.rises);
      const expected = [
        { of: one, ratio: ratioAtEqualNoise(points(first, logged), below, backgroundDba, headlineDba) },
        {
          of: other,
          ratio: ratioAtEqualNoise(points(second, second.rises, [148.5, 150, 150]), below, backgroundDba, headlineDba),
        },
      ];
      const baselineK = baselineDeltaTK(below, backgroundDba, headlineDba);
      await reader.page.goto("/designs?season=" + staged.seasonSlug);
      for (const { of } of expected)
        await reader.page.getByRole("checkbox", { name: new RegExp(`Clip ${of.name}`) }).check({ force: true });
      await reader.page.getByRole("link", { name: /Lay over the baseline/ }).click();
      await reader.page.waitForURL(/\/compare/);
      await reader.page.getByRole("heading", { level: 1, name: /over the baseline/ }).waitFor();
      const answer = await reader.page.request.get(
        `/api/v1/compare?${new URL(reader.page.url()).searchParams}&level=${headlineDba}`,
      );
      expect(answer.ok()).toBe(true);
      const words = (await reader.page.locator("main").innerText()).replaceAll("−", "-");
      for (const { of, ratio } of expected) {
        const sheet = (await (await reader.page.request.get(`/api/v1/sheets/${of.slug}`)).json()) as {
          equalNoise: { levelDba: number; reached: { ratio: { value: number } } | null }[];
        };
        const shown =
          sheet.equalNoise.find((each) => each.levelDba === headlineDba)?.reached?.ratio.value ?? Number.NaN;
        // 0.05 K of 60 K is what a window shorter than the whole record may move a log's mean.
        expect(Math.abs(shown - ratio), `${of.name}: ${shown} against ${ratio}`).toBeLessThan(0.001);
        expect(words, `${of.name} against the baseline at ${headlineDba} dB(A)`).toContain(
          ((ratio - 1) * baselineK).toFixed(1),
        );
      }
      const faults = [...complaints, ...host.complaints, ...reviewer.complaints].filter(
        (each) => !/status of 4\d\d/.test(each),
      );
      expect(faults).toEqual([]);
    },
  );
});

async function pressAndWait(page: import("playwright-core").Page, name: string, path: string): Promise<void> {
  const answered = page.waitForResponse(
    (answer) => answer.url().endsWith(path) && answer.request().method() === "POST",
  );
  await page.getByRole("button", { name, exact: true }).click();
  const answer = await answered;
  if (!answer.ok()) throw new Error(`${name}: ${answer.status()} ${await answer.text()}`);
}
