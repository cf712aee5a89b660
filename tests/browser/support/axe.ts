import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import type { Page } from "playwright-core";

const axeSource = readFileSync(createRequire(import.meta.url).resolve("axe-core/axe.min.js"), "utf8");

/**
 * What axe finds wrong on the page as it stands, a line a rule with the first element it names; empty when nothing.
 * @param rules the rules to run by their ids; all of axe's defaults without
 */
export async function wrongsByAxe(page: Page, rules?: string[]): Promise<string[]> {
  // Evaluated, not loaded as a script: the page's policy lets in no script but its own.
  if (!(await page.evaluate(() => "axe" in window))) await page.evaluate(axeSource);
  return page.evaluate(async (only) => {
    const { axe } = window as unknown as {
      axe: { run(options: object): Promise<{ violations: { id: string; nodes: { html: string }[] }[] }> };
    };
    // The same rules; what is only told of (selectors, what passed) is left out, which is a good part of the time.
    const told = { resultTypes: ["violations"], selectors: false, preload: { assets: ["media"] } };
    const options = only ? { ...told, runOnly: { type: "rule", values: only } } : told;
    return (await axe.run(options)).violations.map((each) => `${each.id}: ${each.nodes[0]?.html ?? ""}`);
  }, rules);
}

/** By how many CSS px the page scrolls sideways. */
export const scrollsSidewaysBy = (page: Page): Promise<number> =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
