import { randomBytes } from "node:crypto";
import { describe, expect, it } from "vitest";
import { generateRotor } from "@/lib/science/geometry/rotor-generator";
import { demoPassword } from "@/db/seeds/demo/seed-people";
import { writeBinaryStl } from "@/lib/science/geometry/stl-write";
import { nineBlades as nine } from "../factories/nine-blades";
import { setUpBrowser } from "../setup/browser";
import { publishDraft } from "./support/publish-draft";

const browser = setUpBrowser();
const tag = randomBytes(3).toString("hex");

describe("a model on the fit page", () => {
  it("is carried into a draft through signing in, confirmed there, and stands on the sheet once published", async () => {
    const { page, complaints } = await browser.open();
    // The server reads the model in a thread beside everything else.
    page.setDefaultTimeout(90_000);
    await page.goto("/fit");
    await page.locator("#fit [aria-busy=false]").waitFor();
    const sent: string[] = [];
    page.on("request", (request) => {
      if (request.url().includes("/uploads")) sent.push(request.url());
    });
    const buffer = Buffer.from(writeBinaryStl(generateRotor(nine), `nine ${tag}`));
    await page.getByLabel("Model file").setInputFiles({ name: "nine.stl", mimeType: "model/stl", buffer });
    await page.getByText("triangles read and measured").waitFor();
    await page.getByRole("button", { name: "Carry it on into a draft" }).click();
    await page.getByLabel("E-mail").fill("designer@alder.example");
    await page.getByLabel("Password").fill(demoPassword);
    await page.getByRole("button", { name: "Sign in", exact: true }).click();

    await page.waitForURL("**/fit");
    // The same model is there again, and nothing has left the browser yet.
    await page.getByText("triangles read and measured").waitFor();
    expect(sent).toEqual([]);
    await page.getByLabel("Name of the design").fill(`Carried ${tag}`);
    await page.getByRole("button", { name: "Send nine.stl into a draft" }).click();
    await page.waitForURL(`**/my/designs/carried-${tag}/revisions/A`);

    // The server's own reading waits for confirmation.
    await page.getByRole("button", { name: "Confirm these traits" }).waitFor();
    const row = (name: string) => page.getByRole("row", { name: new RegExp(`^${name}`) });
    expect(await row("Blades").innerText()).toMatch(/\b9\b/);
    expect(await row("Hand").innerText()).toMatch(/left/);
    expect(await row("Tip diameter").innerText()).toMatch(/\b110 mm/);
    expect(await row("Hub diameter").innerText()).toMatch(/\b40 mm/);
    await page.getByRole("button", { name: "Confirm these traits" }).click();
    await page.getByText("Confirmed: they hold for this revision.").waitFor();
    expect(complaints).toEqual([]);

    await publishDraft({ slug: `carried-${tag}`, letter: "A" });
    const { page: reader } = await browser.open();
    reader.setDefaultTimeout(90_000);
    const answer = await reader.goto(`/designs/carried-${tag}`);
    expect(answer?.status()).toBe(200);
    const sheet = await (await reader.request.get(`/api/v1/sheets/carried-${tag}`)).json();
    expect(sheet.traits.rotors[0]).toMatchObject({ blades: 9, hand: "left", tipDiameterMm: 110, hubDiameterMm: 40 });
    expect(sheet.traits.readFromMesh.length).toBeGreaterThan(5);
    // Drawn from the file itself.
    const drawing = reader.locator("#drawing");
    await drawing.getByRole("img", { name: /Front view: 9 blades, left-handed; tip Ø 110.0 mm/ }).waitFor();
    await drawing.getByText("Drawn from the mesh").waitFor();
  });
});
