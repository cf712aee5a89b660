import { randomBytes } from "node:crypto";
import type { Page } from "playwright-core";
import { describe, expect, it, vi } from "vitest";
import { setUpBrowser } from "../setup/browser";

const browser = setUpBrowser();
const password = "herons stand in shallow water";

const pathOf = (page: Page) => new URL(page.url()).pathname;

async function signInOn(page: Page, email: string, typed: string): Promise<void> {
  await page.goto("/sign-in?to=/my/account");
  await page.getByLabel(/e-?mail/i).fill(email);
  await page.getByLabel(/password/i).fill(typed);
  await page.getByRole("button", { name: /sign in/i }).click();
}

describe("somebody new", () => {
  it("signs up, presses the button behind the letter's link, signs in, and a host gives a role", async () => {
    const handle = `wader-${randomBytes(3).toString("hex")}`;
    const email = `${handle}@people.example`;
    const { page, complaints } = await browser.open({ width: 360 });
    await page.goto("/sign-up");
    await page.getByLabel("E-mail").fill(email);
    await page.getByLabel("Handle").fill(handle);
    await page.getByLabel("Password").fill("too short");
    await page.getByRole("button", { name: "Make the account" }).click();
    await page.getByText(/needs 12 characters/).waitFor();
    expect(await page.getByLabel("E-mail").inputValue()).toBe(email);
    expect(await page.getByLabel("Password").inputValue()).toBe("too short");
    await page.getByLabel("Password").fill(password);
    await page.getByRole("button", { name: "Make the account" }).click();
    await page.getByText("A letter is on its way").waitFor();

    await vi.waitFor(async () => {
      await page.goto(`/demo/mail?to=${email}`);
      expect(await page.locator("li a").count()).toBe(1);
    }, 30_000);
    await page.locator("li a").first().click();
    await page.getByRole("button", { name: "Confirm this address" }).click();
    await page.getByText("Your address is confirmed").waitFor();
    await signInOn(page, email, password);
    await page.waitForURL((url) => url.pathname === "/my/account");
    expect(await page.locator("h1").textContent()).toBe("Your account");

    const host = await browser.open({ as: "host" });
    await host.page.goto(`/host/people?contains=${handle}`);
    await host.page.getByLabel(`Role of ${handle}`).selectOption("operator");
    const given = host.page.waitForResponse((answer) => answer.url().endsWith("/role"));
    await host.page.getByRole("button", { name: `Make ${handle} operator` }).click();
    expect((await given).status()).toBe(200);
    await page.goto("/my/account");
    expect(pathOf(page)).toBe("/sign-in");
    // The API's refusals are said aloud by the browser; anything else, a blocked script say, is a fault.
    const faults = [...complaints, ...host.complaints].filter((each) => !/status of 4\d\d/.test(each));
    expect(faults).toEqual([]);
  });
});

describe("signing in", () => {
  it("keeps what was typed when it is refused, and leads to where one wanted", async () => {
    const { page } = await browser.open();
    await signInOn(page, "member@alder.example", "not this one");
    await page.getByText("don't belong together").waitFor();
    expect(await page.getByLabel(/e-?mail/i).inputValue()).toBe("member@alder.example");
    await page.getByLabel(/password/i).fill("alder-bench-demo");
    await page.getByRole("button", { name: /sign in/i }).click();
    await page.waitForURL((url) => url.pathname === "/my/account");
    await page.getByText("Your account: ").waitFor({ state: "attached" });
    await page.locator("summary").first().click();
    await page.getByRole("button", { name: "Sign out", exact: true }).click();
    await page.waitForURL((url) => url.pathname === "/");
    await page.goto("/my/account");
    expect(pathOf(page)).toBe("/sign-in");
  });
});
