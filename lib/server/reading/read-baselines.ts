import { z } from "zod";
import { appDb, publicDb } from "@/db/client/handles";
import { chartChecks, chartPhases } from "@/db/queries/baseline-charts";
import {
  shownAgreedValues,
  shownBaselines,
  shownBaselineSessions,
  shownBridges,
  shownUnits,
  type ShownBaselineRow,
  type ShownUnitRow,
} from "@/db/queries/shown/baselines";
import { baselineCheckSchema, type Baseline, type BaselineBridge, type BaselineLine } from "@/lib/contracts/baselines";
import { snapshotPointSchema } from "@/lib/contracts/publication";
import { ANONYMOUS, type Actor } from "@/lib/domain/accounts/actor";
import { may } from "@/lib/domain/accounts/policy";
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
 * A baseline with its units, agreed values, bridges, control charts, and what published sessions read of it. The charts
 * show published sessions, and bench qualifications and bridges of open seasons; to the host every closed session.
 * @throws ExpectedError not_found when no open season counts it
 */
export async function readBaseline({ slug, actor = ANONYMOUS }: { slug: string; actor?: Actor }): Promise<Baseline> {
  const db = publicDb();
  const [baseline] = await shownBaselines(db, { slug });
  if (!baseline) throw new ExpectedError("not_found", "There is no public baseline at this address.");
  const units = await shownUnits(db, { baselineIds: [baseline.id] });
  const of = { unitIds: units.map((unit) => unit.id) };
  const all = may(actor, "baseline.manage");
  const charts = { ...of, all };
  const chartDb = all ? appDb() : db;
  const [agreed, bridges, checks, phases, sessions] = await Promise.all([
    shownAgreedValues(db, of),
    shownBridges(db, of),
    chartChecks(chartDb, charts),
    chartPhases(chartDb, charts),
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
    checks: checks.map(({ unitId, at, chart, ...check }) =>
      baselineCheckSchema.parse({ ...chart, ...check, serial: serialOf(unitId), at: iso(at) }),
    ),
    phases: phases.map(({ unitId, from, ...phase }) => ({ ...phase, serial: serialOf(unitId), from: iso(from) })),
    sessions: sessions.map(({ unitId, beganAt, points, ...session }) => ({
      ...session,
      serial: serialOf(unitId),
      beganAt: iso(beganAt),
      points: frozenPoints.parse(points).map(sheetPoint),
    })),
  };
}
