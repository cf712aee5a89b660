import { z } from "zod";
import { time } from "./base";

export const ledgerEntrySchema = z.strictObject({
  entryId: z.uuid(),
  /** Null: withdrawn since. */
  slug: z.string().nullable(),
  name: z.string().nullable(),
  letter: z.string().nullable(),
});
export type LedgerEntry = z.infer<typeof ledgerEntrySchema>;

export const correctionSchema = z.strictObject({
  number: z.int(),
  what: z.string(),
  why: z.string(),
  publishedAt: time,
  entries: z.array(ledgerEntrySchema),
});
export type Correction = z.infer<typeof correctionSchema>;

export const answeredQuestionSchema = z.strictObject({
  entry: ledgerEntrySchema,
  figure: z.string(),
  body: z.string(),
  answer: z.string(),
  answeredAt: time,
  byHandle: z.string(),
});
export type AnsweredQuestion = z.infer<typeof answeredQuestionSchema>;

/** Corrections made and questions answered, each the newest first. */
export const ledgerSchema = z.strictObject({
  corrections: z.array(correctionSchema),
  questions: z.array(answeredQuestionSchema),
});
export type Ledger = z.infer<typeof ledgerSchema>;
