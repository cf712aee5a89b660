import { describe, expect, it } from "vitest";
import { wildBootstrap } from "@/lib/domain/study/wild-bootstrap";
import { fitWithinCells } from "@/lib/science/statistics/cell-effects";
import { createRandom } from "@/lib/science/statistics/random";
import { clusterErrors, numbered, wildClusterP } from "@/lib/science/statistics/robust-errors";

const random = createRandom(3);
const n = 36;
const draw = () => Float64Array.from({ length: n }, () => random.normal());
const [x, z] = [draw(), draw()];
const y = x.map((value, i) => 0.4 * value - 0.2 * (z[i] ?? 0) + random.normal());
const cells = Array.from({ length: n }, (_, i) => `season ${i % 3}`);

function both(designers: number, seed: number) {
  const clusters = Array.from({ length: n }, (_, i) => `designer ${(i * 7) % designers}`);
  const fitted = fitWithinCells([x, z], y, cells);
  if ("refused" in fitted) throw new Error(fitted.refused);
  const { fit, within } = fitted;
  const robust = clusterErrors(within, fit, clusters, 3);
  const t = Array.from(fit.coefficients, (b, j) => b / (robust?.errors[j] ?? Number.NaN));
  const [cell, cluster] = [numbered(cells), numbered(clusters)];
  const quick = wildBootstrap(
    {
      columns: within,
      residuals: fit.residuals,
      coefficients: fit.coefficients,
      cell: cell.index,
      cells: cell.count,
      cluster: cluster.index,
      clusters: cluster.count,
      inverse: fit.inverse,
      t,
    },
    0,
    seed,
  );
  const dummies = ["season 0", "season 1", "season 2"].map((name) => cells.map((each) => (each === name ? 1 : 0)));
  return { quick, refitted: wildClusterP([x, z, ...dummies], y, 0, clusters, { seed }) };
}

describe("the bootstrap from sums over clusters", () => {
  it.each([
    { designers: 6, draws: 64 },
    { designers: 8, draws: 256 },
    { designers: 12, draws: 1999 },
  ])(
    "gives the p of refitting every draw with $designers designers",
    ({ designers, draws }) => {
      const { quick, refitted } = both(designers, 11);
      expect(quick.draws).toBe(draws);
      expect(quick.p).toBe(refitted?.p);
    },
    60_000,
  );
});
