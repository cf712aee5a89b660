import { z } from "zod";
import { publicDb } from "@/db/client/handles";
import {
  shownAgreedValues,
  shownBaselines,
  shownBaselineSessions,
  shownBridges,
  shownChecks,
  shownUnits,
  type ShownBaselineRow,
  type ShownUnitRow,
} from "@/db/queries/shown/baselines";
import type { Baseline, BaselineBridge, BaselineLine } from "@/lib/contracts/baselines";
import { snapshotPointSchema } from "@/lib/contracts/publication";
import { ExpectedError } from "@/lib/domain/expected-error";
import { stated } from "@/lib/domain/results/stated";
import { sheetPoint } from "./sheet-page";

const iso = (at: Date): string => at.toISOString();
const frozenPoints = z.array(snapshotPointSchema);

function line({ id, ...baseline }: ShownBaselineRow, units: readonly ShownUnitRow[]): BaselineLine {
  return {
    ...baseline,
    units: units
      .filter((unit) => unit.baselineId === id)
      .map(({ serial, inServiceFrom, retiredAt, retiredReason }) => ({
        serial,
        inServiceFrom: iso(inServiceFrom),
        retiredAt: retiredAt ? iso(retiredAt) : null,
        retiredReason,
      })),
  };
}

/** Every baseline of open seasons with its units. */
export async function readBaselines(): Promise<{ items: BaselineLine[] }> {
  const db = publicDb();
  const baselines = await shownBaselines(db);
  const units = await shownUnits(db, { baselineIds: baselines.map((each) => each.id) });
  return { items: baselines.map((each) => line(each, units)) };
}

/**
 * A baseline with its units, agreed values, bridges, check runs, and what published sessions read of it.
 * @throws ExpectedError not_found when no open season counts it
 */
export async function readBaseline({ slug }: { slug: string }): Promise<Baseline> {
  const db = publicDb();
  const [baseline] = await shownBaselines(db, { slug });
  if (!baseline) throw new ExpectedError("not_found", "There is no public baseline at this address.");
  const units = await shownUnits(db, { baselineIds: [baseline.id] });
  const of = { unitIds: units.map((unit) => unit.id) };
  const [agreed, bridges, checks, sessions] = await Promise.all([
    shownAgreedValues(db, of),
    shownBridges(db, of),
    shownChecks(db, of),
    shownBaselineSessions(db, of),
  ]);
  const serialOf = (unitId: string): string => units.find((unit) => unit.id === unitId)?.serial ?? "another baseline’s";
  return {
    ...line(baseline, units),
    agreed: agreed.map(({ unitId, from, ...value }) => ({ ...value, serial: serialOf(unitId), from: iso(from) })),
    bridges: bridges.flatMap(({ fromUnit, toUnit, ratio, difference, u, dof, ...bridge }): BaselineBridge[] => {
      const value = ratio ?? difference;
      if (value === null) return [];
      const kind = ratio === null ? "difference" : "ratio";
      const ends = { from: serialOf(fromUnit), to: serialOf(toUnit) };
      return [{ ...bridge, ...ends, kind, figure: stated({ value, u, dof }) }];
    }),
    checks: checks.map(({ unitId, at, ...check }) => ({ ...check, serial: serialOf(unitId), at: iso(at) })),
    sessions: sessions.map(({ unitId, beganAt, points, ...session }) => ({
      ...session,
      serial: serialOf(unitId),
      beganAt: iso(beganAt),
      points: frozenPoints.parse(points).map(sheetPoint),
    })),
  };
}
