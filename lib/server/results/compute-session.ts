import { v7 as uuidv7 } from "uuid";
import type { Handle } from "@/db/client/connect";
import { replaceResults, type ComparisonRow, type CurveRow, type ResultRow } from "@/db/queries/results";
import { sessionRecords } from "@/db/queries/session-record";
import { effectiveDof, standardUncertainty, type Effect } from "@/lib/domain/results/effects";
import { METHOD_V1 } from "@/lib/domain/results/methods/v1/parameters";
import { dofOrNull, roundResult } from "@/lib/domain/results/rounding";
import {
  protocolPositionIds,
  sessionFigures,
  splitFigure,
  type SessionFigures,
  type SplitFigure,
  type SubjectFigures,
} from "@/lib/domain/results/session-figures";
import type { SessionRecord } from "@/lib/domain/results/session-record";

/**
 * Computes a session from its readings as they stand and stores results, comparisons and curves in the place of the
 * old ones. Within one transaction when the handle is one. @returns the figures, undefined for a session that is none
 */
export async function computeSession(db: Handle, sessionId: string): Promise<SessionFigures | undefined> {
  const [record] = await sessionRecords(db, { sessionIds: [sessionId] });
  if (!record) return undefined;
  const figures = sessionFigures(record);
  await replaceResults(db, { sessionId, ...rowsOf(record, figures) });
  return figures;
}

/** The rows that a session's figures make; the level at each position alone beside the protocol's mean. */
export function rowsOf(
  record: SessionRecord,
  figures: SessionFigures,
): { results: ResultRow[]; comparisons: ComparisonRow[]; curves: CurveRow[] } {
  const results: ResultRow[] = [];
  const comparisons: ComparisonRow[] = [];
  const baselineRows = figures.baseline ? subjectRows(record, figures.baseline) : [];
  results.push(...baselineRows);
  for (const entry of figures.entries) {
    const rows = subjectRows(record, entry);
    results.push(...rows);
    comparisons.push(...comparisonRows(entry, rows, baselineRows));
  }
  const alone = record.positions.filter((position) => !protocolPositionIds(record).includes(position.id));
  for (const position of alone) {
    const there = sessionFigures(record, [position.id]);
    for (const each of [there.baseline, ...there.entries])
      if (each) results.push(...subjectRows(record, each, position.id).filter((row) => row.quantity === "level_dba"));
  }
  const curves = [figures.baseline, ...figures.entries].flatMap((each) => (each ? [curveRow(record, each)] : []));
  return { results, comparisons, curves };
}

function subjectRows(record: SessionRecord, figures: SubjectFigures, positionId: string | null = null): ResultRow[] {
  return figures.points.flatMap((point): ResultRow[] => {
    const readingIds = [...(figures.readingIds.get(point.setSpeedRpm) ?? [])];
    const row = (
      quantity: ResultRow["quantity"],
      figure: SplitFigure,
      detail: Record<string, unknown> = {},
    ): ResultRow => ({
      id: uuidv7(),
      session_id: record.sessionId,
      entry_id: figures.subject.entryId,
      specimen_id: figures.subject.specimenId,
      baseline_unit_id: figures.subject.baselineUnitId,
      set_speed: point.setSpeedRpm,
      position_id: positionId,
      quantity,
      value: figure.value,
      u_own_run: figure.uOwnRun,
      u_own_mount: figure.uOwnMount,
      u_shared_offset: figure.uSharedOffset,
      u_shared_gain: figure.uSharedGain,
      dof: figure.dof,
      upper_bound: quantity === "level_dba" && point.upperBound,
      runs: figures.subject.points.filter((each) => each.setSpeedRpm === point.setSpeedRpm).length,
      method_version: METHOD_V1.version,
      reading_ids: readingIds,
      detail: { mounts: point.mounts, ...detail },
    });
    return [
      row("level_dba", splitFigure(point.correctedDba, point.levelEffects), {
        correctionDb: roundResult(point.correctionDb),
      }),
      row("delta_t_k", splitFigure(point.deltaTK, point.deltaTEffects), { powerW: roundResult(point.powerW) }),
      row("thermal_resistance_kpw", splitFigure(point.resistanceKPerW, point.deltaTEffects, 1 / point.powerW)),
    ];
  });
}

function comparisonRows(entry: SubjectFigures, rows: ResultRow[], baselineRows: ResultRow[]): ComparisonRow[] {
  return rows.flatMap((row): ComparisonRow[] => {
    const below = baselineRows.find((each) => each.set_speed === row.set_speed && each.quantity === row.quantity);
    const against = entry.against.get(row.set_speed);
    if (!below || !against) return [];
    const u = (effects: readonly Effect[]) => roundResult(standardUncertainty(effects));
    const pair = { result_id: row.id, baseline_result_id: below.id };
    if (row.quantity === "thermal_resistance_kpw") {
      const { value, effects } = against.resistanceRatio;
      const difference = row.value - below.value;
      return [
        {
          ...pair,
          difference: roundResult(difference),
          u_difference: roundResult(standardUncertainty(effects) * below.value),
          ratio: roundResult(value),
          u_ratio: u(effects),
          dof: dofOrNull(effectiveDof(effects)),
        },
      ];
    }
    const { value, effects } = row.quantity === "level_dba" ? against.levelDifferenceDb : against.deltaTDifferenceK;
    return [
      {
        ...pair,
        difference: roundResult(value),
        u_difference: u(effects),
        ratio: null,
        u_ratio: null,
        dof: dofOrNull(effectiveDof(effects)),
      },
    ];
  });
}

function curveRow(record: SessionRecord, figures: SubjectFigures): CurveRow {
  return {
    session_id: record.sessionId,
    entry_id: figures.subject.entryId,
    baseline_unit_id: figures.subject.baselineUnitId,
    position_id: null,
    points: (figures.curve?.resistanceKnots ?? []).map(({ x, y }) => ({
      levelDba: roundResult(x),
      resistanceKPerW: roundResult(y),
    })),
    equal_noise: [],
    method_version: METHOD_V1.version,
  };
}
