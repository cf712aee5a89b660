import { coverageFactor95 } from "@/lib/science/statistics/uncertainty";

/** A figure as it is told to people: with its coverage factor and the half-width of its 95 % interval. */
export type Stated = {
  readonly value: number;
  readonly u: number;
  /** Null: taken as known exactly. */
  readonly dof: number | null;
  readonly k: number;
  readonly u95: number;
};

/**
 * A figure with its expanded uncertainty for 95 % coverage, in the figure's unit: k from Student's t at the effective
 * degrees of freedom (JCGM 100:2008, 6.3.3 and G.6.4), the normal's where they are null.
 */
export function stated({ value, u, dof }: { value: number; u: number; dof: number | null }): Stated {
  const k = coverageFactor95(dof ?? Infinity);
  return { value, u, dof, k, u95: k * u };
}
