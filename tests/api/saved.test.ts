import { beforeAll, describe, expect, it } from "vitest";
import { savedComparison, savedComparisons, savedSearch, sharedComparison } from "@/lib/contracts/saved";
import { signedOut, signInAs, type Session } from "../setup/session";

let member: Session;
let designer: Session;
let entries: string;

interface Listed {
  items: { slug: string; letter: string; seasonSlug: string }[];
}

beforeAll(async () => {
  [member, designer] = await Promise.all([signInAs("member"), signInAs("designer")]);
  const { items } = (await (await member.fetch("/api/v1/designs?season=season-4")).json()) as Listed;
  const tokens = items.slice(0, 2).map(({ slug, letter, seasonSlug }) => `${slug}.${letter}.${seasonSlug}`);
  entries = tokens.join(",").toLowerCase();
});

const save = async (body: object) =>
  member.send("POST", "/api/v1/my/comparisons", { name: "Two", note: "", shared: false, ...body });
const kept = async (body: object) => savedComparison.parse(await (await save(body)).json());

describe("a saved comparison", () => {
  it("is its owner's alone: nobody else reads, changes or deletes it, or learns that it is there", async () => {
    const { id } = await kept({ address: `/compare?entries=${entries}` });
    const change = { name: "Mine now", note: "", shared: true };
    const statuses = [
      (await designer.fetch(`/api/v1/my/comparisons/${id}`)).status,
      (await designer.send("PUT", `/api/v1/my/comparisons/${id}`, change)).status,
      (await designer.send("DELETE", `/api/v1/my/comparisons/${id}`)).status,
      (await signedOut().fetch(`/api/v1/my/comparisons/${id}`)).status,
    ];
    expect(statuses).toEqual([404, 404, 404, 401]);
    const listed = savedComparisons.parse(await (await designer.fetch("/api/v1/my/comparisons")).json());
    expect(listed.items.map((each) => each.id)).not.toContain(id);
    expect(savedComparison.parse(await (await member.fetch(`/api/v1/my/comparisons/${id}`)).json()).name).toBe("Two");
  });

  it("is read by whoever has its key, until that is taken back for ever", async () => {
    const { id, sharedAddress } = await kept({ address: `/compare?entries=${entries}`, shared: true, note: "Which?" });
    const key = sharedAddress?.split("/").at(-1) ?? "";
    const read = () => signedOut().fetch(`/api/v1/shared-comparisons/${key}`);
    const shown = sharedComparison.parse(await (await read()).json());
    expect(shown).toMatchObject({ name: "Two", note: "Which?" });
    expect(JSON.stringify(shown)).not.toContain("@");
    const change = (shared: boolean) =>
      member.send("PUT", `/api/v1/my/comparisons/${id}`, { name: "Two", note: "", shared });
    expect((await change(false)).status).toBe(200);
    expect((await read()).status).toBe(404);
    const again = savedComparison.parse(await (await change(true)).json());
    expect(again.sharedAddress).not.toBe(sharedAddress);
    expect((await read()).status).toBe(404);
  });

  it.each([
    ["another site's address", "https://elsewhere.example/compare?entries=a.a.b"],
    ["a script", "javascript:alert(1)"],
    ["another page", "/host?entries=a.a.season-1"],
    ["no entry", "/compare"],
  ])("refuses %s, and says which field", async (_what, address) => {
    const answer = await save({ address });
    expect(answer.status).toBe(400);
    expect(JSON.stringify(await answer.json())).toContain("address");
  });
});

describe("a saved search", () => {
  it("is its owner's alone, and holds no more than the index's own address", async () => {
    const answer = await member.send("POST", "/api/v1/my/searches", {
      name: "Season 4",
      address: "/designs?season=season-4&page=3",
    });
    const made = savedSearch.parse(await answer.json());
    expect(made.address).not.toContain("page=");
    expect((await designer.send("DELETE", `/api/v1/my/searches/${made.id}`)).status).toBe(404);
    const elsewhere = await member.send("POST", "/api/v1/my/searches", {
      name: "x",
      address: "//evil.example/designs",
    });
    expect(elsewhere.status).toBe(400);
  });
});
