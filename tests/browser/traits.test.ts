import { readFileSync } from "node:fs";
import { parse } from "csv-parse/sync";
import { describe, expect, it } from "vitest";
import { setUpBrowser } from "../setup/browser";
import { scrollsSidewaysBy } from "./support/axe";

const browser = setUpBrowser();

describe.each([{ width: 1280 }, { width: 360 }])("a designer at $width px", ({ width }) => {
  it("asks of a trait by the sentence, reads its effect, and downloads the very table", async () => {
    const { page, complaints } = await browser.open({ as: "designer", width });
    await page.goto("/traits");
    expect(await page.locator("h1").textContent()).toContain("Traits");
    // Pairs stand before effects: the strongest evidence first.
    const titles = await page.locator("h2").allTextContents();
    expect(titles.slice(0, 2)).toEqual(["Pairs that differ in one trait", "Effects over all entries"]);

    await page.getByRole("button", { name: "Trait: every trait" }).click();
    await page.getByRole("radio", { name: /^Tip gap/ }).check();
    await page.waitForURL((url) => url.searchParams.get("trait") === "gap");
    await page.keyboard.press("Escape");
    await page.locator("#spread h3", { hasText: "Tip gap" }).waitFor();

    // Sideways only tables scroll.
    expect(await scrollsSidewaysBy(page)).toBeLessThanOrEqual(0);

    await page.locator("#effects summary", { hasText: "The same figures as a table" }).first().click();
    const row = page.locator("#effects .chart table tbody tr", { hasText: "Tip gap, +0.1 mm" });
    const shown = await row.locator("td, th").allTextContents();
    const [saved] = await Promise.all([
      page.waitForEvent("download"),
      page.locator("#effects").getByRole("link", { name: "Effects as CSV" }).click(),
    ]);
    expect(saved.suggestedFilename()).toBe("traits-gap-effects.csv");
    const rows: Record<string, string>[] = parse(readFileSync(await saved.path()), { columns: true });
    const effect = rows.find(({ trait }) => trait === "gap");
    const figure = (text: string | undefined) => Number(text?.trim().replace("−", "-"));
    expect(figure(shown[1])).toBeCloseTo(Number(effect?.effect), 2);
    expect(figure(shown[2])).toBeCloseTo(Number(effect?.low_95), 2);
    expect(figure(shown[3])).toBeCloseTo(Number(effect?.high_95), 2);
    expect(figure(shown[4])).toBe(Number(effect?.n));
    // The toy model makes a wider gap cost cooling; the interval says so too.
    expect(Number(effect?.low_95)).toBeGreaterThan(0);
    expect(complaints).toEqual([]);
  });
});

describe("the study's states", () => {
  it("says what to do when nothing fits, and keeps the question in the address", async () => {
    const { page } = await browser.open();
    await page.goto("/traits?trait=blades&season=season-99");
    await page.getByText("No published entry fits the question").waitFor();
    await page.getByRole("link", { name: "Ask it of all entries" }).click();
    await page.waitForURL((url) => url.search === "?trait=blades");
    await page.locator("#effects").waitFor();
  });
});
