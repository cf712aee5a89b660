import { beforeAll, describe, expect, it } from "vitest";
import { routesOfTree } from "../api/support/matrix-routes";
import { setUpBrowser, type Opened } from "../setup/browser";
import { scrollsSidewaysBy, wrongsByAxe } from "./support/axe";
import { filledPages, filledPatterns, pageAddresses, type PageAddress, type Reader } from "./support/page-addresses";

const browser = setUpBrowser();
const patterns = routesOfTree()
  .filter((route) => route.startsWith("PAGE "))
  .map((route) => route.slice("PAGE ".length));

let found: PageAddress[] = [];

beforeAll(async () => {
  found = [...(await pageAddresses(patterns)), ...(await filledPages())];
});

/**
 * What is wrong with a page: by Web Content Accessibility Guidelines 2.2, A and AA, as far as axe-core's rules reach, in
 * light; by 1.4.3 contrast (minimum) on the dark tokens; by 1.4.10 reflow, 320 CSS px without scrolling in two
 * directions, tables excepted. One load: theme and width change under the page, as they do under people.
 */
async function wrongsOf({ path, as }: PageAddress): Promise<string[]> {
  const opened = idle[as]?.pop() ?? (await browser.open({ as: as === "signed out" ? undefined : as }));
  const { page, complaints } = opened;
  complaints.length = 0;
  await page.setViewportSize({ width: 1280, height: 900 });
  await page.emulateMedia({ colorScheme: "light" });
  const answer = await page.goto(path);
  await page.waitForLoadState("networkidle");
  const said = answer?.status() === 200 ? [] : [`answered ${answer?.status() ?? "nothing"}`];
  if ((await page.locator("h1").count()) !== 1) said.push("has not just one h1");
  said.push(...(await wrongsByAxe(page)));
  await page.emulateMedia({ colorScheme: "dark" });
  said.push(...(await wrongsByAxe(page, ["color-contrast"])).map((each) => `in dark, ${each}`));
  await page.setViewportSize({ width: 320, height: 900 });
  // Charts take their new width a moment later.
  const fits = () => document.documentElement.scrollWidth <= document.documentElement.clientWidth;
  await page.waitForFunction(fits, undefined, { timeout: 5_000 }).catch(() => undefined);
  const by = await scrollsSidewaysBy(page);
  if (by > 0) said.push(`scrolls sideways by ${by} px at 320 px`);
  (idle[as] ??= []).push(opened);
  return [...said, ...complaints].map((each) => `${path}: ${each}`);
}

/** Pages that wait for their next address, by reader. */
const idle: Partial<Record<Reader, Opened[]>> = {};

describe("every page of the tree", () => {
  it("is reached by links in the demo", () => {
    const reached = new Set(found.map((each) => each.pattern));
    expect(patterns.filter((pattern) => !reached.has(pattern))).toEqual([]);
  });

  it.concurrent.each([...patterns, ...filledPatterns])(
    "%s: axe finds nothing, dark keeps its contrast, 320 px don't scroll sideways",
    async (pattern) => {
      const address = found.find((each) => each.pattern === pattern);
      if (!address) throw new Error(`Nothing in the demo leads to ${pattern}.`);
      expect(await wrongsOf(address)).toEqual([]);
    },
  );
});
