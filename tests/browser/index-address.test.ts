import { describe, expect, it } from "vitest";
import { setUpBrowser } from "../setup/browser";
import { scrollsSidewaysBy } from "./support/axe";

const browser = setUpBrowser();

describe("the index as its address says it", () => {
  it("keeps an order that nobody chose out of the address, so that one season shows the usual one", async () => {
    const { page } = await browser.open({});
    await page.goto("/designs");
    await page.getByRole("button", { name: /^Blades, first stage/ }).click();
    await page.getByRole("checkbox", { name: /^9 / }).check();
    await page.waitForURL((url) => url.searchParams.get("blades1") === "9");
    expect(new URL(page.url()).searchParams.get("sort")).toBeNull();
    await page.getByRole("button", { name: /^Season: / }).click();
    await page.getByRole("checkbox", { name: /^Season 4 / }).check();
    await page.waitForURL((url) => url.searchParams.get("season") === "season-4");
    await expect.poll(() => page.getByLabel("Sort by").inputValue()).toBe("equal");
  });

  it("shows the figure that it is sorted by, as a column and under each drawing", async () => {
    const { page } = await browser.open({});
    await page.goto("/designs?season=season-4&sort=-mass");
    expect(await page.locator("th[aria-sort=descending]").innerText()).toContain("Rotor mass");
    await page.goto("/designs?season=season-4&sort=-mass&view=drawings");
    expect(await page.locator("[data-stop]").first().innerText()).toMatch(/\d g\b/);
  });

  it("marks what answers a mistyped word so that one sees it", async () => {
    const { page } = await browser.open({});
    await page.goto("/designs?q=hernwing");
    const mark = page.locator("#list mark").first();
    expect(await mark.innerText()).toBe("Heronwing");
    expect(await mark.evaluate((each) => getComputedStyle(each).backgroundColor)).not.toMatch(
      /^(rgba\(0, 0, 0, 0\)|transparent)$/,
    );
  });

  it("keeps what was picked on a later page when one goes back", async () => {
    const { page } = await browser.open({});
    await page.goto("/designs");
    const slots = page.getByRole("checkbox", { name: /^Clip / });
    await slots.nth(0).check();
    await page.getByRole("link", { name: /^Further/ }).click();
    await page.waitForURL((url) => url.searchParams.get("page") === "2");
    await page.waitForURL((url) => url.searchParams.has("clip"));
    await slots.nth(0).check();
    const picks = () => (new URL(page.url()).searchParams.get("clip") ?? "").split(",");
    await expect.poll(() => picks().length).toBe(2);
    const both = picks();
    await page.goBack();
    await page.waitForURL((url) => !url.searchParams.has("page"));
    await expect.poll(picks).toEqual(both);
  });

  it("goes through the parts that could be added by arrows", async () => {
    const { page } = await browser.open({});
    await page.goto("/designs");
    await page.getByRole("button", { name: /add a part/ }).press("Enter");
    const on = () => page.evaluate(() => document.activeElement?.textContent);
    await expect.poll(on).toBe("Stages");
    await page.keyboard.press("ArrowDown");
    expect(await on()).toBe("Blades, second stage");
    await page.keyboard.press("End");
    expect(await on()).toBe("Print time");
  });

  it("prints its usual columns on a portrait page, without slots", async () => {
    // A4 is 210 mm wide (ISO 216): 688 px between the sheet's margins of 14 mm, at 96 px an inch (CSS Values 4, 6.2).
    const { page } = await browser.open({ width: 688 });
    await page.emulateMedia({ media: "print" });
    await page.goto("/designs?season=season-4");
    expect(await page.locator("#list tbody tr").count()).toBe(20);
    expect(await page.getByRole("checkbox", { name: /^Clip / }).count()).toBe(0);
    expect(await scrollsSidewaysBy(page)).toBeLessThanOrEqual(0);
  });
});
