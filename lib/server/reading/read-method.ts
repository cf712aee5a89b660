import { publicDb } from "@/db/client/handles";
import { shownBudgetParts, shownMethodVersions } from "@/db/queries/shown/method";
import type { Method } from "@/lib/contracts/method";
import { groupBy } from "@/lib/domain/group-by";

/** The change log of the method and the budgets of the benches that seasons count. */
export async function readMethod(): Promise<Method> {
  const db = publicDb();
  const [versions, parts] = await Promise.all([shownMethodVersions(db), shownBudgetParts(db)]);
  const budgets = groupBy(parts, (part) => `${part.bench} ${part.budgetVersion}`);
  return {
    versions: versions.map(({ from, ...version }) => ({ ...version, from: from.toISOString() })),
    budgets: [...budgets.values()].flatMap((rows) => {
      const [first] = rows;
      if (!first) return [];
      const { bench, budgetVersion, microphone, microphoneDistanceMm } = first;
      return [
        {
          bench,
          budgetVersion,
          microphone,
          microphoneDistanceMm,
          parts: rows.map(({ quantity, name, u, unit, evaluation, distribution, dof, source, kind }) => ({
            quantity,
            name,
            u,
            unit,
            evaluation,
            distribution,
            dof,
            source,
            kind,
          })),
        },
      ];
    }),
  };
}
