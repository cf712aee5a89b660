import type { Page } from "playwright-core";
import { describe, expect, it } from "vitest";
import { generateRotor, generateRotors, type RotorSpec } from "@/lib/science/geometry/rotor-generator";
import { nineBlades as nine } from "../factories/nine-blades";
import { binaryStl } from "../factories/rotor-mesh";
import { setUpBrowser } from "../setup/browser";
import { scrollsSidewaysBy, wrongsByAxe } from "./support/axe";

const browser = setUpBrowser();

const file = (name: string, bytes: Uint8Array) => ({ name, mimeType: "model/stl", buffer: Buffer.from(bytes) });
const rotorFile = (...specs: RotorSpec[]) => file("rotor.stl", binaryStl(generateRotors(specs)));

async function openFit(page: Page): Promise<string[]> {
  await page.goto("/fit");
  // The reader itself is loaded with the page.
  await page.locator("#fit [aria-busy=false]").waitFor();
  const asked: string[] = [];
  page.on("request", (request) => {
    // The page fetches its neighbours ahead; what would take a model away has a body, or goes elsewhere.
    const elsewhere = /^https?:/.test(request.url()) && !request.url().startsWith(new URL(page.url()).origin);
    if (elsewhere || request.postDataBuffer() !== null) asked.push(request.url());
  });
  return asked;
}

const give = (page: Page, model: ReturnType<typeof file>) => page.getByLabel("Model file").setInputFiles(model);
const measured = (page: Page) => page.getByText("triangles read and measured").waitFor();
const firstRow = (page: Page) =>
  page.getByRole("table", { name: "Rotors in order along the axis" }).locator("tbody tr").first();

describe("a model that is dropped on the page", () => {
  it("is read beside it: blades, hand and diameters, its drawing, and nothing asked of the network", async () => {
    const { page, complaints } = await browser.open();
    const asked = await openFit(page);
    const bytes = [...binaryStl(generateRotor(nine))];
    const dropped = await page.evaluateHandle((data) => {
      const transfer = new DataTransfer();
      transfer.items.add(new File([new Uint8Array(data)], "nine.stl"));
      return transfer;
    }, bytes);
    await page.getByText("Drop an STL or 3MF file here").dispatchEvent("drop", { dataTransfer: dropped });
    await measured(page);
    // As the generator was told: 9 blades, left, tip 2 × 55 mm, hub 2 × 20 mm.
    const row = (await firstRow(page).innerText()).split(/\s+/);
    expect(row).toEqual(expect.arrayContaining(["9", "left", "110.0", "40.0"]));
    await page.getByRole("img", { name: /Front view: 9 blades, left-handed; tip Ø 110.0 mm, hub Ø 40.0 mm/ }).waitFor();
    // The demo's frame of 120 mm has a bore of 114 mm: (114 − 110) / 2.
    await page.getByText("Tip gap, nominal").waitFor();
    expect(await page.locator("#frame").innerText()).toMatch(/Tip gap, nominal\s+2\.00 mm/);
    // A frame that was measured: (116.5 − 110) / 2.
    await page.getByText("Measured the frame at hand?").click();
    await page.getByRole("textbox", { name: "Bore" }).fill("116,5");
    await page.locator("#frame").getByText("3.25 mm").waitFor();
    expect(await page.locator("#frame").innerText()).toContain("as you measured it");
    expect(asked).toEqual([]);
    expect(complaints).toEqual([]);
  });

  it("is asked for its unit when it looks wrong, by keyboard alone", async () => {
    const { page } = await browser.open({ width: 360 });
    await openFit(page);
    const mesh = generateRotor(nine);
    const inches = { ...mesh, positions: mesh.positions.map((value) => value / 25.4) };
    await give(page, file("inches.stl", binaryStl(inches)));
    const question = page.getByRole("button", { name: "Measure it in inches" });
    await question.waitFor();
    await question.focus();
    await page.keyboard.press("Enter");
    await measured(page);
    expect((await firstRow(page).innerText()).split(/\s+/)).toContain("110.0");
  });

  it("is refused with the reason when it is none, and the page goes on", async () => {
    const { page } = await browser.open();
    await openFit(page);
    await give(page, file("step.stp", Buffer.from("ISO-10303-21;\nHEADER;\n")));
    await page.getByText("Fanfold doesn't measure them").waitFor();
    await give(page, file("cut.stl", binaryStl(generateRotor(nine)).slice(0, 5000)));
    await page.getByText(/there is room for/).waitFor();
    await give(page, rotorFile(nine));
    await measured(page);
  });

  it("has its crossings stepped through by buttons and arrow keys", async () => {
    const { page } = await browser.open();
    await openFit(page);
    const second: RotorSpec = { ...nine, blades: 6, hand: "right", middleZMm: 40 };
    await give(page, rotorFile(nine, second));
    await measured(page);
    const crossings = page.locator("#crossings");
    // gcd(9, 6) = 3 pairs at once, lcm 18 moments a relative turn.
    await crossings.getByText(/3 pairs of blades in line/).waitFor();
    await crossings.getByRole("button", { name: "Half a step on" }).click();
    await crossings.getByText(/no blades in line/).waitFor();
    await crossings.getByRole("group", { name: /arrow keys/ }).focus();
    await page.keyboard.press("ArrowRight");
    // A whole step, counter-rotating at one speed: half of 360° / 18.
    await crossings.getByText("Step 2: rotor 1 turned by 10.0°, 3 pairs of blades in line").waitFor();
  });
});

describe("the page with a model on it", () => {
  for (const [width, theme] of [
    [1280, "light"],
    [360, "dark"],
  ] as const) {
    it(`has nothing for axe to say and scrolls no way but down at ${width} px, ${theme}`, async () => {
      const { page } = await browser.open({ width, theme });
      await openFit(page);
      // A season of the demo, whose bench has keep-out solids; another test may have opened a newer one.
      await page.getByLabel("Season", { exact: true }).selectOption({ label: "Season 4" });
      await give(page, rotorFile(nine, { ...nine, blades: 7, hand: "right", middleZMm: 40 }));
      await measured(page);
      await page.getByRole("img", { name: /Side view/ }).waitFor();
      await page.getByText(/Keep-out solids of/).waitFor();
      expect(await wrongsByAxe(page)).toEqual([]);
      expect(await scrollsSidewaysBy(page)).toBe(0);
      expect((await page.locator("main").innerText()).toLowerCase()).not.toMatch(/\bsafe\b/);
    });
  }
});
