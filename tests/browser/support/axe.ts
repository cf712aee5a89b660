import { readFileSync } from "node:fs";
import { createRequire } from "node:module";
import type { Page } from "playwright-core";

const axeFile = createRequire(import.meta.url).resolve("axe-core/axe.min.js");

/**
 * What axe finds wrong on the page as it stands, a line a rule with the first element it names; empty when nothing.
 * @param rules the rules to run by their ids; all of axe's defaults without
 */
export async function wrongsByAxe(page: Page, rules?: string[]): Promise<string[]> {
  // Evaluated, not loaded as a script: the page's policy lets in no script but its own.
  await page.evaluate(readFileSync(axeFile, "utf8"));
  return page.evaluate(async (only) => {
    const { axe } = window as unknown as {
      axe: { run(options: object): Promise<{ violations: { id: string; nodes: { html: string }[] }[] }> };
    };
    const options = only ? { runOnly: { type: "rule", values: only } } : {};
    return (await axe.run(options)).violations.map((each) => `${each.id}: ${each.nodes[0]?.html ?? ""}`);
  }, rules);
}

/** By how many CSS px the page scrolls sideways. */
export const scrollsSidewaysBy = (page: Page): Promise<number> =>
  page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
