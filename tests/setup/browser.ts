import { rmSync } from "node:fs";
import { chromium, type Browser, type BrowserContext, type BrowserContextOptions, type Page } from "playwright-core";
import { afterAll, beforeAll, expect } from "vitest";
import { temporaryFolder } from "./temporary-folder";
import { baseUrl, signInAs, type DemoPerson } from "./session";

export interface OpenOptions extends BrowserContextOptions {
  /** Signed in as one of the demo's accounts; signed out without. */
  as?: DemoPerson;
  width?: number;
  theme?: "light" | "dark";
}

export interface Opened {
  page: Page;
  context: BrowserContext;
  /** What the page wrote to its console as a warning or error, and errors that nobody caught. */
  complaints: string[];
}

/** Debian's Chromium for one test file: `open()` gives a page with a state of its own. */
export function setUpBrowser(): { open(options?: OpenOptions): Promise<Opened> } {
  let browser: Browser | undefined;
  const folder = temporaryFolder("browser");
  beforeAll(async () => {
    browser = await chromium.launch({
      executablePath: "/usr/bin/chromium",
      env: { HOME: folder, PATH: "/usr/bin:/bin" },
      // Root's Chromium has no sandbox, and nothing here may reach out.
      args: [
        ...(process.getuid?.() === 0 ? ["--no-sandbox"] : []),
        "--disable-gpu",
        "--disable-quic",
        "--no-first-run",
        "--disable-background-networking",
        "--disable-component-update",
        "--disable-sync",
        "--disable-dev-shm-usage",
        "--font-render-hinting=none",
      ],
    });
  });
  afterAll(async () => {
    await browser?.close();
    rmSync(folder, { recursive: true, force: true });
  });
  return {
    async open({ as, width = 1280, theme = "light", ...more } = {}) {
      if (!browser) throw new Error("The browser is there once the tests run, not while the file loads.");
      const context = await browser.newContext({
        baseURL: baseUrl(),
        viewport: { width, height: 900 },
        colorScheme: theme,
        reducedMotion: "reduce",
        locale: "en-GB",
        timezoneId: "UTC",
        ...more,
      });
      if (as) await context.addCookies(await cookiesOf(as));
      const page = await context.newPage();
      const complaints: string[] = [];
      page.on("console", (message) => {
        if (["error", "warning"].includes(message.type())) complaints.push(`${message.type()}: ${message.text()}`);
      });
      page.on("pageerror", (error) => complaints.push(`uncaught: ${error.message}`));
      return { page, context, complaints };
    },
  };
}

async function cookiesOf(who: DemoPerson): Promise<{ name: string; value: string; url: string }[]> {
  const session = await signInAs(who);
  const pairs = session.cookie().split("; ");
  expect(pairs.length, "signing in gives a cookie").toBeGreaterThan(0);
  return pairs.map((pair) => {
    const [name = "", ...rest] = pair.split("=");
    return { name, value: rest.join("="), url: baseUrl() };
  });
}
