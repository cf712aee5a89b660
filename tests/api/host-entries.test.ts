import { expect, it } from "vitest";
import { hostEntries } from "@/lib/contracts/entries";
import { signInAs } from "@/tests/setup/session";

it("the host's entries come page by page, those that waited longest first, none twice and none left out", async () => {
  const host = await signInAs("host");
  const path = "/api/v1/host/entries?state=published";
  const all = hostEntries.parse(await (await host.fetch(`${path}&limit=200`)).json()).items.slice(0, 100);
  const pages = [];
  for (let after = ""; pages.length < 100;) {
    const page = hostEntries.parse(await (await host.fetch(`${path}&limit=40${after}`)).json());
    pages.push(...page.items);
    expect(page.items.length).toBe(40);
    after = `&after=${page.next}`;
  }
  expect(pages.slice(0, 100)).toEqual(all);
  const times = all.map(({ stateAt }) => stateAt);
  expect(times).toEqual(times.toSorted());
  expect((await host.fetch(`${path}&after=nobody`)).status).toBe(400);
});
