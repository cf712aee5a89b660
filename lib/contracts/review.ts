import { z } from "zod";
import { ROUND_STATES } from "@/lib/domain/seasons/round-moves";
import { ENTRY_STATES } from "@/lib/domain/designs/entry-moves";
import { RULE_KINDS } from "@/lib/domain/scoring/rules";
import { id, time } from "./base";
import { snapshotSchema } from "./publication";

const words = z.string().trim();

/** A round as the reviewers' list shows it: states and counts, no figure. */
export const reviewListItem = z.strictObject({
  roundId: id,
  seasonNumber: z.int(),
  number: z.int(),
  title: z.string(),
  state: z.enum(ROUND_STATES),
  entries: z.int(),
  publishAt: time.nullable(),
  /** The host lent the round to the person who asks. */
  lent: z.boolean(),
  /** Why the person who asks sees no figure of it; null when they may. */
  closedWhy: z.string().nullable(),
});
export type ReviewListItem = z.infer<typeof reviewListItem>;
export const reviewList = z.strictObject({ items: z.array(reviewListItem) });

export const standingRowItem = z.strictObject({
  entryId: id,
  score: z.number().nullable(),
  uScore: z.number().nullable(),
  rank: z.int().nullable(),
  rankLow: z.int().nullable(),
  rankHigh: z.int().nullable(),
  pFirst: z.number().nullable(),
  letters: z.string().nullable(),
  whyNotRanked: z.string().nullable(),
});

/** A standing that is computed to be looked at and stored nowhere. */
export const dryStanding = z.strictObject({
  ruleKind: z.enum(RULE_KINDS),
  draws: z.int().positive(),
  rows: z.array(standingRowItem),
});
export type DryStanding = z.infer<typeof dryStanding>;

export const reviewEntry = z.strictObject({
  entryId: id,
  designName: z.string(),
  letter: z.string(),
  state: z.enum(ENTRY_STATES),
  sessionId: id.nullable(),
  /** What publishing would freeze; null with the reason where there are no figures. */
  snapshot: snapshotSchema.nullable(),
  whyNone: z.string().nullable(),
});
export type ReviewEntry = z.infer<typeof reviewEntry>;

export const reviewSession = z.strictObject({
  sessionId: id,
  number: z.int(),
  operator: z.string().nullable(),
  beganAt: time,
  endedAt: time.nullable(),
  holds: z.array(
    z.strictObject({ code: z.string(), reason: z.string(), raisedAt: time, liftNote: z.string().nullable() }),
  ),
});

export const reviewPast = z.strictObject({
  at: time,
  reviewer: z.string().nullable(),
  verdict: z.enum(["signed", "sent_back"]),
  note: z.string(),
  entries: z.array(z.strictObject({ entryId: id, reason: z.string() })),
});

export const reviewChange = z.strictObject({ at: time, entryId: id.nullable(), what: z.string() });

/** A round as its reviewer sees it, before the hour. `sha256` is what signing it would sign. */
export const reviewRound = z.strictObject({
  roundId: id,
  seasonNumber: z.int(),
  number: z.int(),
  state: z.enum(ROUND_STATES),
  publishAt: time.nullable(),
  levelsDba: z.array(z.number()),
  headlineDba: z.number(),
  sha256: z.string(),
  /** Why the one who asks may not sign it now, each in words; empty when they may. */
  whyNotSign: z.array(z.string()),
  /** Whether the one who asks may review it at all: sign it or send it back. */
  mayReview: z.boolean(),
  entries: z.array(reviewEntry),
  standings: z.array(dryStanding),
  sessions: z.array(reviewSession),
  past: z.array(reviewPast),
  /** What changed since the newest review; everything is new where there was none, and this is empty. */
  changes: z.array(reviewChange),
});
export type ReviewRound = z.infer<typeof reviewRound>;

export const reviewReading = z.strictObject({
  readingId: id,
  quantity: z.string(),
  position: z.string().nullable(),
  rotorPosition: z.int().nullable(),
  value: z.number(),
  unit: z.string(),
  source: z.string(),
  takenBy: z.string().nullable(),
  takenAt: time,
  reason: z.string().nullable(),
  /** The reading that took its place; null when it stands. */
  supersededBy: id.nullable(),
});
export type ReviewReading = z.infer<typeof reviewReading>;

export const reviewRun = z.strictObject({
  runId: id,
  ofBaseline: z.boolean(),
  setSpeed: z.number(),
  mountNumber: z.int(),
  repeatNumber: z.int(),
  ordinal: z.int(),
  state: z.enum(["open", "done", "held", "discarded"]),
  reason: z.string().nullable(),
  readings: z.array(reviewReading),
});
export type ReviewRun = z.infer<typeof reviewRun>;

/** Every raw reading behind an entry's figures: its own runs, the baseline's, and those of the session itself. */
export const reviewEntryReadings = z.strictObject({
  roundId: id,
  entry: reviewEntry,
  runs: z.array(reviewRun),
  sessionReadings: z.array(reviewReading),
});
export type ReviewEntryReadings = z.infer<typeof reviewEntryReadings>;

export const signBody = z.strictObject({
  expectedSha256: z.string().regex(/^[0-9a-f]{64}$/, "is no SHA-256"),
  note: words.max(4000).default(""),
});
export const signAnswer = z.strictObject({ reviewId: id, sha256: z.string() });

export const sendBackBody = z.strictObject({
  note: words.min(1, "is missing: say what is wrong").max(4000),
  entries: z
    .array(z.strictObject({ entryId: id, reason: words.min(1, "is missing: say why").max(1000) }))
    .min(1, "names no entry")
    .max(500),
});
export const sendBackAnswer = z.strictObject({ reviewId: id });

export const roundEntryParams = z.strictObject({ id, entryId: id });
