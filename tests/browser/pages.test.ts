import type { Page } from "playwright-core";
import { beforeAll, describe, expect, it } from "vitest";
import { routesOfTree } from "../api/support/matrix-routes";
import { setUpBrowser } from "../setup/browser";
import { scrollsSidewaysBy, wrongsByAxe } from "./support/axe";
import { filledPages, filledPatterns, pageAddresses, type PageAddress } from "./support/page-addresses";

const browser = setUpBrowser();
const patterns = routesOfTree()
  .filter((route) => route.startsWith("PAGE "))
  .map((route) => route.slice("PAGE ".length));

let found: PageAddress[] = [];

beforeAll(async () => {
  found = [...(await pageAddresses(patterns)), ...(await filledPages())];
});

interface Look {
  width: number;
  theme: "light" | "dark";
  wrongs: (page: Page) => Promise<string[]>;
}

/** Web Content Accessibility Guidelines 2.2, A and AA, as far as axe-core's rules reach. */
const axe: Look = { width: 1280, theme: "light", wrongs: (page) => wrongsByAxe(page) };
/** 1.4.3 contrast (minimum), on the dark tokens. */
const contrast: Look = { width: 1280, theme: "dark", wrongs: (page) => wrongsByAxe(page, ["color-contrast"]) };
/** 1.4.10 reflow: 320 CSS px without scrolling in two directions, tables excepted. */
const reflow: Look = {
  width: 320,
  theme: "light",
  wrongs: async (page) => {
    const by = await scrollsSidewaysBy(page);
    return by > 0 ? [`scrolls sideways by ${by} px`] : [];
  },
};

async function look({ path, as }: PageAddress, { width, theme, wrongs }: Look): Promise<string[]> {
  const who = as === "signed out" ? undefined : as;
  const { page, context, complaints } = await browser.open({ width, theme, as: who });
  const answer = await page.goto(path);
  await page.waitForLoadState("networkidle");
  const said = await wrongs(page);
  if (answer?.status() !== 200) said.push(`answered ${answer?.status() ?? "nothing"}`);
  if ((await page.locator("h1").count()) !== 1) said.push("has not just one h1");
  await context.close();
  return [...said, ...complaints].map((each) => `${path}, ${width} px, ${theme}: ${each}`);
}

describe("every page of the tree", () => {
  it("is reached by links in the demo", () => {
    const reached = new Set(found.map((each) => each.pattern));
    expect(patterns.filter((pattern) => !reached.has(pattern))).toEqual([]);
  });

  it.each([...patterns, ...filledPatterns])(
    "%s: axe finds nothing, dark keeps its contrast, 320 px don't scroll sideways",
    async (pattern) => {
      const address = found.find((each) => each.pattern === pattern);
      if (!address) throw new Error(`Nothing in the demo leads to ${pattern}.`);
      const said: string[] = [];
      for (const each of [axe, contrast, reflow]) said.push(...(await look(address, each)));
      expect(said).toEqual([]);
    },
  );
});
