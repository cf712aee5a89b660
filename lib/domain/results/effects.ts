import { combineIndependent, welchSatterthwaite } from "@/lib/science/statistics/uncertainty";

export type Quantity = "level" | "delta_t" | "ratio";
export type EffectKind = "own_run" | "own_mount" | "shared_offset" | "shared_gain" | "bridge";

/**
 * What one independent source of error does to a figure: sensitivity × standard uncertainty, signed, in the unit of
 * the figure. Two figures that name the same source move together, which is how shared parts cancel (JCGM 100:2008,
 * F.1.2.3: correlation removed by introducing the common influence as an input of its own).
 */
export type Effect = {
  readonly source: string;
  readonly kind: EffectKind;
  readonly quantity: Quantity;
  /** The subject it belongs to, or the session where it is shared. */
  readonly owner: string;
  readonly size: number;
  /** Degrees of freedom of the source's standard uncertainty; Infinity where it is taken as known. */
  readonly dof: number;
};

/**
 * The effects on Σ factor × figure: same sources are added with their signs, in order of first appearance. Where one
 * source comes with several degrees of freedom the smallest holds.
 */
export function combineEffects(
  terms: readonly { readonly factor: number; readonly effects: readonly Effect[] }[],
): Effect[] {
  const places = new Map<string, number>();
  const firsts: Effect[] = [];
  const sizes: number[] = [];
  const dofs: number[] = [];
  for (const { factor, effects } of terms) {
    for (const effect of effects) {
      const at = places.get(effect.source);
      if (at === undefined) {
        places.set(effect.source, firsts.length);
        firsts.push(effect);
        sizes.push(factor * effect.size);
        dofs.push(effect.dof);
      } else {
        sizes[at] = (sizes[at] ?? 0) + factor * effect.size;
        dofs[at] = Math.min(dofs[at] ?? Infinity, effect.dof);
      }
    }
  }
  return firsts.map(({ source, kind, quantity, owner }, i) => ({
    source,
    kind,
    quantity,
    owner,
    size: sizes[i] ?? 0,
    dof: dofs[i] ?? Infinity,
  }));
}

/** Combined standard uncertainty of a figure, in its unit; 0 for no effects (JCGM 100:2008, 5.1.2, eq. 10). */
export function standardUncertainty(effects: readonly Effect[]): number {
  return combineIndependent(effects.map((effect) => effect.size));
}

/** Effective degrees of freedom of a figure, not truncated, Infinity for no finite part (JCGM 100:2008, eq. G.2b). */
export function effectiveDof(effects: readonly Effect[]): number {
  return welchSatterthwaite(effects.map(({ size, dof }) => ({ u: Math.abs(size), dof })));
}

/** The part of a figure's uncertainty that comes from one kind (and one quantity), in the figure's unit. */
export function uncertaintyOfKind(effects: readonly Effect[], kind: EffectKind, quantity?: Quantity): number {
  return standardUncertainty(
    effects.filter((effect) => effect.kind === kind && (quantity === undefined || effect.quantity === quantity)),
  );
}
