import type { MeasuredPoint } from "@/lib/domain/results/measured-point";
import type { RoundInput } from "@/lib/domain/scoring/round-input";
import { measuredCurve, measuredPoint } from "./measured-point";

/** One session of baseline B-01 with the given entries; plain sum, 2,000 draws, unless a test says otherwise. */
export function roundInput(
  entries: Readonly<Record<string, readonly MeasuredPoint[]>>,
  changes: Partial<RoundInput> = {},
  baseline: readonly MeasuredPoint[] = measuredCurve([30, 35, 40], [40, 34, 30]),
): RoundInput {
  return {
    sessions: [
      {
        id: "s1",
        baseline: { unit: "B-01", points: baseline },
        entries: Object.entries(entries).map(([id, points]) => ({ id, points })),
      },
    ],
    rule: { kind: "plain-sum", levelsDba: [] },
    grade: "engineering",
    seed: 1,
    draws: 2000,
    ...changes,
  };
}

/** Entries of one point each, from (ΔT in K, level in dB(A)). */
export function onePointEntries(
  figures: Readonly<Record<string, readonly [deltaTK: number, levelDba: number]>>,
): Record<string, MeasuredPoint[]> {
  return Object.fromEntries(
    Object.entries(figures).map(([id, [deltaTK, levelReadDba]]) => [id, [measuredPoint({ deltaTK, levelReadDba })]]),
  );
}
