import type { z } from "zod";
import { appDb } from "@/db/client/handles";
import type { Handle } from "@/db/client/connect";
import { benchSetupRows } from "@/db/queries/bench-setup";
import {
  insertBaseline,
  insertBaselineUnit,
  insertBench,
  insertBenchVersion,
  insertBudget,
  insertBudgetPart,
  insertPosition,
  insertProtocol,
  insertProtocolVersion,
} from "@/db/queries/host-benches";
import type * as admin from "@/lib/contracts/bench-admin";
import type { Actor, Person } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { note, type Asked } from "../audit/audit";
import { demand } from "../permission";

/** Everything that a season is set up from, for the host. */
export async function readBenchSetup(actor: Actor): Promise<admin.BenchSetup> {
  demand(actor, "bench.manage");
  return benchSetupRows(appDb());
}

/** One addition by the host, with its audit row. @throws ExpectedError not_found when what it belongs to isn't there */
async function add(
  asked: Asked,
  what: string,
  after: unknown,
  work: (tx: Handle, person: Person) => Promise<string | undefined>,
): Promise<{ id: string }> {
  const { actor } = asked;
  demand(actor, what.startsWith("baseline") ? "baseline.manage" : "bench.manage");
  return appDb().transaction(async (tx) => {
    const id = await work(tx, actor);
    if (id === undefined) throw new ExpectedError("not_found", "What this belongs to isn't there.");
    await note(tx, asked, { action: `${what}.add`, subjectKind: what, subjectId: id, after });
    return { id };
  });
}

export const addBench = (asked: Asked, bench: z.output<typeof admin.newBench>) =>
  add(asked, "bench", bench, (tx) => insertBench(tx, bench));

export const addBenchVersion = (
  asked: Asked,
  { benchId, version, at }: { benchId: string; version: z.output<typeof admin.newBenchVersion>; at: Date },
) => add(asked, "bench_version", version, (tx) => insertBenchVersion(tx, { benchId, version, at }));

export const addPosition = (
  asked: Asked,
  params: { benchVersionId: string; position: z.output<typeof admin.newPosition> },
) => add(asked, "microphone_position", params, (tx) => insertPosition(tx, params));

/** @throws ExpectedError malformed for a part whose unit isn't its own, or two parts of one name */
export async function addBudget(
  asked: Asked,
  {
    benchVersionId,
    note: words,
    parts = [],
  }: { benchVersionId: string; note: string; parts?: z.output<typeof admin.newBudget>["parts"] },
): Promise<{ id: string }> {
  const names = parts.map((part) => `${part.quantity} ${part.name}`);
  parts.forEach((part, i) => {
    checkUnit(part, `parts[${i}].unit`);
    if (names.indexOf(names[i] ?? "") === i) return;
    throw new ExpectedError("malformed", `There are two parts called ${part.name}.`, [
      { path: `parts[${i}].name`, message: "is another part's name" },
    ]);
  });
  return add(asked, "budget_version", { benchVersionId, note: words, parts }, async (tx, person) => {
    const id = await insertBudget(tx, { benchVersionId, note: words, byPerson: person.personId });
    if (id !== undefined) for (const part of parts) await insertBudgetPart(tx, { budgetId: id, part });
    return id;
  });
}

function checkUnit({ kind, quantity, unit }: z.output<typeof admin.newBudgetPart>, path: string): void {
  const wanted = kind === "shared_gain" ? "relative" : quantity === "level_dba" ? "dB" : "K";
  if (unit === wanted) return;
  throw new ExpectedError("malformed", `The unit of this part is ${wanted}.`, [{ path, message: `is not ${wanted}` }]);
}

/** @throws ExpectedError malformed for a gain that isn't relative, or a unit that isn't the quantity's */
export async function addBudgetPart(
  asked: Asked,
  params: { budgetId: string; part: z.output<typeof admin.newBudgetPart> },
): Promise<{ id: string }> {
  checkUnit(params.part, "unit");
  return add(asked, "budget_part", params, (tx) => insertBudgetPart(tx, params));
}

export const addProtocol = (asked: Asked, protocol: z.output<typeof admin.newProtocol>) =>
  add(asked, "protocol", protocol, (tx) => insertProtocol(tx, protocol));

export const addProtocolVersion = (
  asked: Asked,
  params: { protocolId: string; version: z.output<typeof admin.newProtocolVersion> },
) => add(asked, "protocol_version", params, (tx) => insertProtocolVersion(tx, params));

export const addBaseline = (asked: Asked, baseline: z.output<typeof admin.newBaseline>) =>
  add(asked, "baseline", baseline, (tx) => insertBaseline(tx, baseline));

export const addBaselineUnit = (
  asked: Asked,
  params: { baselineId: string } & z.output<typeof admin.newBaselineUnit>,
) => add(asked, "baseline_unit", params, (tx) => insertBaselineUnit(tx, params));
