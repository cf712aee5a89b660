import type { Page } from "playwright-core";
import { describe, expect, it } from "vitest";
import { setUpBrowser } from "../setup/browser";
import { scrollsSidewaysBy } from "./support/axe";

const browser = setUpBrowser();

/** What the keyboard is on, and whether a person can see that it is (WCAG 2.2, 2.4.7 and 2.4.11). */
async function focused(page: Page) {
  return page.evaluate(() => {
    const on = document.activeElement;
    if (!(on instanceof HTMLElement) || on === document.body) return { name: "", seen: true };
    const label = on instanceof HTMLInputElement || on instanceof HTMLSelectElement ? on.labels?.[0]?.innerText : "";
    const name = on.getAttribute("aria-label") ?? (label || on.innerText || on.title).trim();
    const marks = [on, on.parentElement, on.closest(".blank, label")].flatMap((each) => (each ? [each] : []));
    const outlined = marks.some((each) => getComputedStyle(each).outlineStyle !== "none");
    const box = on.getBoundingClientRect();
    return { name, seen: outlined && box.bottom > 0 && box.top < window.innerHeight };
  });
}

/** Presses Tab until what is named has the focus. @throws when a press leaves it where it was, or it never comes */
async function tabTo(page: Page, name: RegExp, most = 160): Promise<void> {
  for (let press = 0; press < most; press++) {
    await page.keyboard.press("Tab");
    const now = await focused(page);
    // What slides or scrolls into view may take a moment for it.
    if (!now.seen) await expect.poll(async () => (await focused(page)).seen, { message: now.name }).toBe(true);
    if (name.test(now.name)) return;
  }
  throw new Error(`${most} presses of Tab never came to ${String(name)}`);
}

/** As `page.waitForURL`, for addresses that change in place too. */
const arrive = (page: Page, path: string) => page.waitForURL((url) => url.pathname === path, { timeout: 60_000 });

describe.each([{ width: 1280 }, { width: 390 }])("a builder with a keyboard alone, at $width px", ({ width }) => {
  it("goes from the home page to a saved and shared comparison, signing in on the way", async () => {
    const { page, context, complaints } = await browser.open({ width });
    await page.goto("/");
    // "/" goes to the search from anywhere; what it finds is the index.
    await expect
      .poll(async () => {
        await page.keyboard.press("/");
        return (await focused(page)).name;
      })
      .toMatch(/^Find a design/);
    await page.keyboard.type("quillwork");
    await page.keyboard.press("Enter");
    await arrive(page, "/designs");
    await page.locator("#list tbody tr").first().waitFor();

    // The first slot by Tab, the next by the arrow, each filled by Space.
    await tabTo(page, /^Clip .* for a comparison/);
    await page.keyboard.press("Space");
    await page.keyboard.press("ArrowDown");
    const second = await focused(page);
    expect(second.name).toMatch(/^Clip .* for a comparison/);
    await page.keyboard.press("Space");
    await page.waitForURL((url) => (url.searchParams.get("clip") ?? "").split(",").length === 2);
    await tabTo(page, /^Lay over the baseline/);
    await page.keyboard.press("Enter");
    await arrive(page, "/compare");
    await page.getByRole("link", { name: "Sign in to save this comparison" }).waitFor();

    await tabTo(page, /^Sign in to save this comparison/);
    const asked = new URL(page.url()).searchParams.get("entries");
    await page.keyboard.press("Enter");
    await arrive(page, "/sign-in");
    await tabTo(page, /^E-mail/);
    await page.keyboard.type("member@alder.example");
    await page.keyboard.press("Tab");
    await page.keyboard.type("alder-bench-demo");
    await page.keyboard.press("Enter");

    // Back with the picks as they were, the form open and the name ready to be typed over.
    await arrive(page, "/compare");
    expect(new URL(page.url()).searchParams.get("entries")).toBe(asked);
    await expect.poll(async () => (await focused(page)).name, { timeout: 15_000 }).toMatch(/^Name/);
    await page.keyboard.press("Control+a");
    const name = `Two by the keyboard, ${width}`;
    await page.keyboard.type(name);
    await page.keyboard.press("Tab");
    await page.keyboard.type("Which one for the quiet case?");
    await tabTo(page, /^Share it/);
    await page.keyboard.press("Space");
    await tabTo(page, /^Save$/);
    await page.keyboard.press("Enter");
    await page.getByText(`Saved as “${name}”`).waitFor();
    await tabTo(page, /\/compare\/shared\//);
    await page.keyboard.press("Enter");
    await page.waitForURL((url) => url.pathname.startsWith("/compare/shared/"));

    // Whoever has the link reads it, signed out.
    const shared = page.url();
    await context.clearCookies();
    await page.goto(shared);
    expect(await page.locator("h1").textContent()).toBe(name);
    await page.getByText("Which one for the quiet case?").waitFor();
    expect(await page.getByRole("table").count()).toBeGreaterThan(2);
    expect(await scrollsSidewaysBy(page)).toBeLessThanOrEqual(0);
    expect(complaints).toEqual([]);
  });
});

describe("what is saved", () => {
  it("is listed, taken back from sharing, and deleted; a search too", async () => {
    const { page } = await browser.open({ as: "member" });
    await page.goto("/designs?season=season-4&view=drawings");
    await page.getByRole("list", { name: "Entries that fit" }).getByRole("listitem").first().waitFor();
    await page.locator("#list summary", { hasText: /^(Save this search|Saved searches)/ }).click();
    await page.getByLabel("Name of this search").fill("Pictures of season 4");
    await page.getByRole("button", { name: "Save this search" }).click();
    await page.getByText("This search is saved as “Pictures of season 4”").waitFor();
    await page.goto("/my/searches");
    await page.getByRole("link", { name: "Pictures of season 4" }).first().click();
    await page.waitForURL((url) => url.search === "?season=season-4&view=drawings");
    await page.goto("/my/searches");
    await page.getByRole("button", { name: "Delete the search Pictures of season 4" }).first().click();
    await page.getByText("None yet").waitFor();

    await page.goto("/my/comparisons");
    const before = await page.locator("main h2").count();
    expect(before).toBeGreaterThan(0);
    const shared = await page.locator('a[href^="/compare/shared/"]').first().getAttribute("href");
    await page
      .getByText(/^Change or share/)
      .first()
      .click();
    await page
      .getByLabel(/^Share it/)
      .first()
      .uncheck();
    await page.getByRole("button", { name: "Save the change" }).first().click();
    await page.getByText("Yours alone").first().waitFor();
    expect((await page.request.get(shared ?? "/")).status()).toBe(404);
    await page
      .getByText(/^Delete “/)
      .first()
      .click();
    await page.getByRole("button", { name: "Delete this comparison" }).first().click();
    await expect.poll(() => page.locator("main h2").count()).toBe(before - 1);
  });
});
