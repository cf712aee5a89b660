import { z } from "zod";
import { ENTRY_STATES } from "@/lib/domain/designs/entry-moves";
import { ROUND_STATES } from "@/lib/domain/seasons/round-moves";
import { RULE_KINDS } from "@/lib/domain/scoring/rules";
import { id, time } from "./base";
import { hostEntry } from "./entries";

const words = (most: number) => z.string().trim().max(most);
const level = z.number({ error: "is no number" }).min(0).max(140);

/** What a season is made of. Protocol, rule, levels and budget freeze at its first reading. */
const seasonParts = {
  title: words(120).min(1, "is missing"),
  summary: words(2000).default(""),
  rules: words(8000).default(""),
  protocolVersionId: id,
  scoringRuleVersionId: id,
  levelsDba: z.array(level).min(1, "names no level").max(12),
  headlineDba: level,
  frameIds: z.array(id).min(1, "names no frame").max(20),
  totalDepthMaxMm: z.number().positive().max(500).nullish(),
  inletStackMaxMm: z.number().min(0).max(300).nullish(),
  benchVersionId: id,
  budgetVersionId: id,
  baselineUnitId: id,
};

export const newSeason = z.strictObject({ number: z.int().min(1).max(10_000), ...seasonParts });
export type NewSeason = z.output<typeof newSeason>;
/** Everything but its number; `seen` is the change it was read at. */
export const seasonChange = z.strictObject(seasonParts);
export type SeasonChange = z.output<typeof seasonChange>;

export const seasonMove = z.strictObject({ to: z.enum(["opened", "closed"]) });

export const hostRoundItem = z.strictObject({
  roundId: id,
  number: z.int(),
  title: z.string(),
  state: z.enum(ROUND_STATES),
  entries: z.int(),
  publishAt: time.nullable(),
  publishedAt: time.nullable(),
});
export type HostRoundItem = z.infer<typeof hostRoundItem>;

export const hostSeason = z.strictObject({
  seasonId: id,
  number: z.int(),
  slug: z.string(),
  title: z.string(),
  summary: z.string(),
  rules: z.string(),
  protocolVersionId: id,
  protocol: z.string(),
  scoringRuleVersionId: id,
  rule: z.enum(RULE_KINDS),
  levelsDba: z.array(z.number()),
  headlineDba: z.number(),
  frameIds: z.array(id),
  totalDepthMaxMm: z.number().nullable(),
  inletStackMaxMm: z.number().nullable(),
  benchVersionId: id.nullable(),
  budgetVersionId: id.nullable(),
  baselineUnitId: id.nullable(),
  openedAt: time.nullable(),
  closedAt: time.nullable(),
  frozenAt: time.nullable(),
  entries: z.int(),
  rounds: z.array(hostRoundItem),
});
export type HostSeason = z.infer<typeof hostSeason>;
export const hostSeasons = z.strictObject({ items: z.array(hostSeason) });

export const levelsQuery = z.strictObject({
  levels: z
    .string()
    .max(200)
    .regex(/^\d+([.]\d+)?(,\d+([.]\d+)?)*$/, "is no list of levels such as 40,46,52")
    .transform((text) => text.split(",").map(Number)),
});
/** How many past entries a choice of levels would have left unranked. */
export const levelsTrial = z.strictObject({
  entries: z.int(),
  unranked: z.int(),
  byLevel: z.array(z.strictObject({ levelDba: z.number(), entryNotReached: z.int(), baselineNotReached: z.int() })),
});
export type LevelsTrial = z.infer<typeof levelsTrial>;

export const newRound = z.strictObject({ title: words(120).default(""), entryIds: z.array(id).max(500).default([]) });
export const roundEntries = z.strictObject({ entryIds: z.array(id).min(1, "names no entry").max(500) });
export const takeOut = z.strictObject({ reason: words(1000).min(1, "is missing: say why") });
export const lend = z.strictObject({ handle: words(60).min(1, "is missing") });
/** Without an hour: now. */
export const publishBody = z.strictObject({ publishAt: time.nullable() });

/** Hours that a number of entries asks of the bench; null where not one entry goes into a sitting of that length. */
export const benchHours = z.strictObject({
  entries: z.int(),
  sessionHours: z.number(),
  hoursPerEntry: z.number(),
  entriesPerSession: z.int(),
  sessions: z.int(),
  hours: z.number(),
});
export type BenchHours = z.infer<typeof benchHours>;

export const hostRound = z.strictObject({
  roundId: id,
  seasonId: id,
  seasonNumber: z.int(),
  number: z.int(),
  title: z.string(),
  state: z.enum(ROUND_STATES),
  publishAt: time.nullable(),
  publishedAt: time.nullable(),
  lentTo: z.string().nullable(),
  signedBy: z.string().nullable(),
  signedSha256: z.string().nullable(),
  /** The host who asks owned an entry of it, and therefore doesn't publish it. */
  ownsEntry: z.boolean(),
  entries: z.array(hostEntry),
  takenOut: z.array(z.strictObject({ entryId: id, name: z.string(), reason: z.string().nullable(), at: time })),
  /** Entries of the season that stand in no round before its hour. */
  free: z.array(hostEntry),
  hours: benchHours.nullable(),
  hoursWithFree: benchHours.nullable(),
  moves: z.array(
    z.strictObject({
      at: time,
      from: z.enum(ROUND_STATES),
      to: z.enum(ROUND_STATES),
      by: z.string().nullable(),
      reason: z.string().nullable(),
    }),
  ),
});
export type HostRound = z.infer<typeof hostRound>;

export const made = z.strictObject({ id });
export const entryStates = z.enum(ENTRY_STATES);
