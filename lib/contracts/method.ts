import { z } from "zod";
import { time } from "./base";

/** One part of a bench's uncertainty budget as it stands in the budget version. */
export const budgetPartSchema = z.strictObject({
  quantity: z.enum(["level_dba", "delta_t_k"]),
  name: z.string(),
  u: z.number(),
  unit: z.string(),
  evaluation: z.enum(["A", "B"]),
  distribution: z.string(),
  dof: z.number().nullable(),
  source: z.string(),
  kind: z.enum(["own_run", "own_mount", "shared_offset", "shared_gain"]),
});
export type BudgetPart = z.infer<typeof budgetPartSchema>;

export const benchBudgetSchema = z.strictObject({
  bench: z.string(),
  budgetVersion: z.int(),
  microphone: z.string(),
  microphoneDistanceMm: z.number(),
  parts: z.array(budgetPartSchema),
});
export type BenchBudget = z.infer<typeof benchBudgetSchema>;

export const methodSchema = z.strictObject({
  versions: z.array(z.strictObject({ number: z.int(), note: z.string(), from: time })),
  budgets: z.array(benchBudgetSchema),
});
export type Method = z.infer<typeof methodSchema>;
