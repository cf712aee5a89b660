import { z } from "zod";
import { ENTRY_STATES } from "@/lib/domain/designs/entry-moves";
import { id, pageOf, pageQuery, time } from "./base";

/** An entry as the host's lists show it: no figure. */
export const hostEntry = z.strictObject({
  entryId: id,
  designName: z.string(),
  designSlug: z.string(),
  letter: z.string(),
  owners: z.array(z.string()),
  seasonId: id,
  seasonNumber: z.int(),
  state: z.enum(ENTRY_STATES),
  stateAt: time,
  everPublished: z.boolean(),
  /** The newest reason that was given for a move of it. */
  reason: z.string().nullable(),
  carriedFrom: id.nullable(),
  /** The round before its hour that it stands in. */
  roundId: id.nullable(),
  roundNumber: z.int().nullable(),
  stages: z.int(),
  frameKey: z.string(),
  material: z.string(),
  licence: z.string(),
  /** What the host may do with it now. */
  moves: z.array(z.enum(ENTRY_STATES)),
});
export type HostEntry = z.infer<typeof hostEntry>;

export const hostEntriesQuery = z.strictObject({
  ...pageQuery,
  after: id.optional(),
  state: z.enum(ENTRY_STATES).optional(),
  seasonId: id.optional(),
});
export type HostEntriesQuery = z.infer<typeof hostEntriesQuery>;
export const hostEntries = pageOf(hostEntry);
export type HostEntries = z.infer<typeof hostEntries>;

const reason = z.string().trim().min(1, "is missing: say why").max(1000);

/** A move by the host. `from` is the state that was seen: another by now is a 409. */
export const hostEntryMove = z.discriminatedUnion("to", [
  z.strictObject({ from: z.enum(ENTRY_STATES), to: z.literal("accepted") }),
  z.strictObject({ from: z.enum(ENTRY_STATES), to: z.enum(["returned", "declined", "withdrawn"]), reason }),
  z.strictObject({ from: z.enum(ENTRY_STATES), to: z.literal("on_the_bench"), reason: reason.optional() }),
  z.strictObject({ from: z.enum(ENTRY_STATES), to: z.literal("carried_over"), seasonId: id }),
]);
export type HostEntryMove = z.infer<typeof hostEntryMove>;

export const entryMoved = z.strictObject({ state: z.enum(ENTRY_STATES), newEntryId: id.nullable() });
