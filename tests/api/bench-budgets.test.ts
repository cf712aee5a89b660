import { beforeAll, describe, expect, it } from "vitest";
import { benchSetup, type BenchSetup } from "@/lib/contracts/bench-admin";
import { made } from "@/lib/contracts/seasons-admin";
import { signedOut, signInAs, type Session } from "../setup/session";

type Version = BenchSetup["benches"][number]["versions"][number];

const noise = {
  ...{ quantity: "delta_t_k", name: "Sensor noise", u: 0.05, unit: "K", evaluation: "A", distribution: "student" },
  ...{ dof: 9, source: "ten repeats", kind: "own_run" },
} as const;
const gain = {
  ...{ quantity: "delta_t_k", name: "Sensor gain", u: 0.004, unit: "relative", evaluation: "B" },
  ...{ distribution: "rectangular", dof: null, source: "its certificate", kind: "shared_gain" },
} as const;
const parts = [noise, gain];

let host: Session;

beforeAll(async () => {
  host = await signInAs("host");
});

/** A bench version whose budget a season uses. */
async function inUse(): Promise<Version> {
  const setup = benchSetup.parse(await (await host.fetch("/api/v1/host/benches")).json());
  const versions = setup.benches.flatMap((bench) => bench.versions);
  const version = versions.find(({ budgets }) => budgets.some(({ frozenAt }) => frozenAt !== null));
  if (!version) throw new Error("The demo has no bench with a budget in use.");
  return version;
}

const write = (by: Session, versionId: string, body: unknown) =>
  by.send("POST", `/api/v1/host/bench-versions/${versionId}/budgets`, body);

describe("a budget of a bench", () => {
  it("is written as a new version with all of its parts, and the old ones stay what they were", async () => {
    const before = await inUse();
    const answer = await write(host, before.id, { note: "A second look at the sensor", parts });
    expect(answer.status, await answer.clone().text()).toBe(201);
    const { id } = made.parse(await answer.json());
    const { budgets } = await inUse();
    expect(budgets.slice(0, -1)).toEqual(before.budgets);
    const written = budgets.at(-1);
    expect(written).toMatchObject({ id, note: "A second look at the sensor", frozenAt: null });
    expect(written?.number).toBe((before.budgets.at(-1)?.number ?? 0) + 1);
    const bare = written?.parts.map(({ id: _id, ...part }) => part);
    expect(bare).toHaveLength(2);
    expect(bare).toEqual(expect.arrayContaining(parts));
  });

  it.each([
    ["a unit that isn't the part's", [{ ...noise, unit: "dB" }], "parts[0].unit"],
    ["a gain that isn't relative", [noise, { ...gain, unit: "K" }], "parts[1].unit"],
    ["two parts of one name", [noise, { ...noise, u: 0.1 }], "parts[1].name"],
    ["a size below 0", [{ ...noise, u: -0.1 }], "parts[0].u"],
    ["no number", [{ ...noise, u: "0.1" }], "parts[0].u"],
    ["degrees of freedom of 0", [{ ...noise, dof: 0 }], "parts[0].dof"],
    ["no source", [{ ...noise, source: " " }], "parts[0].source"],
    ["an unknown kind", [{ ...noise, kind: "own" }], "parts[0].kind"],
    ["a field of its own", [{ ...noise, share: 1 }], "parts[0].share"],
  ])("is refused for %s, by its field, and nothing is kept", async (_, wrong, path) => {
    const before = await inUse();
    const answer = await write(host, before.id, { note: "", parts: wrong });
    expect(answer.status).toBe(400);
    const { fields } = (await answer.json()) as { fields: { path: string }[] };
    expect(fields.map((field) => field.path)).toContain(path);
    expect((await inUse()).budgets).toEqual(before.budgets);
  });

  it("is the host's to write: 403 to members and operators, 401 to nobody known", async () => {
    const before = await inUse();
    for (const who of ["member", "designer", "operator", "reviewer"] as const)
      expect((await write(await signInAs(who), before.id, { note: "", parts })).status, who).toBe(403);
    expect((await write(signedOut(), before.id, { note: "", parts })).status).toBe(401);
    expect((await inUse()).budgets).toEqual(before.budgets);
  });

  it("takes no further part once it is frozen", async () => {
    const before = await inUse();
    const frozen = before.budgets.find(({ frozenAt }) => frozenAt !== null);
    expect(frozen, "the demo's budget is in use").toBeDefined();
    const answer = await host.send("POST", `/api/v1/host/budgets/${frozen?.id}/parts`, { ...noise, name: "Late" });
    expect(answer.status).toBe(409);
    expect((await inUse()).budgets).toEqual(before.budgets);
  });
});
