import { z } from "zod";
import { outcomeKeys } from "@/lib/domain/study/outcomes";
import type { StudyResult } from "@/lib/domain/study/study";
import { traitKeys } from "@/lib/domain/study/traits";
import { studyQuestionSchema } from "./study-question";

const count = z.number().int().min(0);
const figure = z.number().optional();
const trait = z.enum(traitKeys);
const whys = [
  "too-few",
  "one-value",
  "varies-in-no-cell",
  "not-apart",
  "too-few-rows",
  "too-few-designers",
  "exact",
] as const;

const spreadSchema = z.strictObject({
  n: count,
  median: figure,
  low: figure,
  high: figure,
  quartileLow: figure,
  quartileHigh: figure,
  values: z.array(z.number()).optional(),
});

const effectSchema = z.strictObject({
  key: z.string(),
  trait,
  level: z.string().optional(),
  reference: z.string().optional(),
  step: figure,
  n: count,
  estimate: figure,
  low: figure,
  high: figure,
  p: figure,
  q: figure,
  vif: figure,
  pooled: figure,
  within: figure,
  cellsDown: count.optional(),
  cellsUp: count.optional(),
  reversed: z.boolean().optional(),
  why: z.enum(whys).optional(),
});

const pairEffectSchema = z.strictObject({
  key: z.string(),
  trait,
  from: z.string().optional(),
  to: z.string().optional(),
  growth: figure,
  pairs: count,
  designers: count,
  better: count,
  sameRound: count,
  sameCell: count,
  estimate: figure,
  low: figure,
  high: figure,
  p: figure,
  q: figure,
  test: z.enum(["signs", "t"]).optional(),
  why: z.literal("too-few").optional(),
});

const worth = z.union([z.string(), z.number()]);
const pairSchema = z.strictObject({
  trait,
  fromEntryId: z.uuid(),
  toEntryId: z.uuid(),
  fromValue: worth,
  toValue: worth,
  change: z.number(),
  expanded: z.number(),
  together: z.enum(["round", "cell", "no"]),
});

const levelSchema = z.strictObject({ key: z.string(), from: figure, to: figure });

/** What a study answers. Figures in the unit of the figure asked for: %, or dB; a missing one is left out. */
export const studyResultSchema = z.strictObject({
  entries: count,
  designers: count,
  seasons: z.array(z.number().int()),
  overall: spreadSchema,
  pairEffects: z.array(pairEffectSchema),
  pairs: z.array(pairSchema),
  pairCounts: z.strictObject({
    derivations: count,
    pairs: count,
    severalTraits: count,
    noTrait: count,
    otherBaseline: count,
    otherDesigner: count,
    notReached: count,
  }),
  chains: z.array(z.array(count)),
  fit: z.strictObject({
    n: count,
    cells: count,
    designers: count,
    leftOut: count,
    dof: figure,
    residualSd: figure,
    errors: z.enum(["cluster-t", "wild-bootstrap", "none"]),
    draws: count.optional(),
    effects: z.array(effectSchema),
  }),
  modelTraits: z.array(trait),
  distributions: z.array(
    z.strictObject({
      trait,
      bins: z.strictObject({ from: z.number(), width: z.number(), count }),
      levels: z.array(
        levelSchema.extend({ spreads: z.record(z.enum(outcomeKeys), spreadSchema), counts: z.array(count).optional() }),
      ),
      without: count,
    }),
  ),
  otherBaseline: count,
  two: z
    .strictObject({
      traits: z.tuple([trait, trait]),
      rows: z.array(levelSchema),
      columns: z.array(levelSchema),
      grid: z.array(z.array(spreadSchema)),
      within: z.array(z.strictObject({ level: levelSchema, n: count, effects: z.array(effectSchema) })),
      points: z.array(z.strictObject({ x: worth, y: z.number(), level: z.string() })),
      everyNth: count,
    })
    .optional(),
  tried: count,
}) satisfies z.ZodType<StudyResult>;

/** Names of the entries that pairs speak of, by id: as they are now. */
const namesSchema = z.record(
  z.uuid(),
  z.strictObject({ slug: z.string(), name: z.string(), letter: z.string(), seasonSlug: z.string() }),
);

const choice = z.strictObject({ value: z.string(), label: z.string(), count });
export const studyChoicesSchema = z.strictObject({
  frames: z.array(choice),
  rotations: z.array(choice),
  seasons: z.array(choice),
});
export type StudyChoices = z.infer<typeof studyChoicesSchema>;

export const studyAnswerSchema = z.strictObject({
  question: studyQuestionSchema,
  /** The slugs that the question's seasons come to; empty: all. */
  seasonSlugs: z.array(z.string()),
  result: studyResultSchema,
  names: namesSchema,
  /** False while the newest publication is still being worked in: the figures are those from before it. */
  current: z.boolean(),
  computedAt: z.iso.datetime({ offset: true }),
});
export type StudyAnswer = z.infer<typeof studyAnswerSchema>;
