import type { Handle } from "../client/connect";

export type Values = Record<string, number | string | boolean | null>;
export type Holds = Record<string, string>;

export interface DraftRevision {
  revisionId: string;
  designId: string;
  designName: string;
  letter: string;
  sentIn: boolean;
  material: string;
  whole: { spacerMm: number; struts: number; inletStack: string; inletStackMm: number; declared: Values; holds: Holds };
  rotors: { position: number; held: Values; declared: Values; holds: Holds }[];
}

/** A rotor's columns by the traits' names; the one place where the two are put together. */
export const rotorColumns = {
  blades: "blades",
  hand: "hand",
  hubDiameterMm: "hub_diameter_mm",
  tipDiameterMm: "tip_diameter_mm",
  sweptDiameterMm: "swept_diameter_mm",
  axialDepthMm: "axial_depth_mm",
  pitchMidDeg: "pitch_mid_deg",
  chordMidMm: "chord_mid_mm",
  solidityMid: "solidity_mid",
  shroud: "shroud",
  unequalSpacing: "unequal_spacing",
  massG: "mass_g",
} as const;

/** A revision of a design that a person owns today, with its traits. With `lock` it is held. Undefined: not theirs. */
export async function ownRevision(
  db: Handle,
  { slug, letter, personId, lock = false }: { slug: string; letter: string; personId: string; lock?: boolean },
): Promise<DraftRevision | undefined> {
  const row = await db("revision as r")
    .join("design as d", "d.id", "r.design_id")
    .join("revision_trait as t", "t.revision_id", "r.id")
    .join("design_owner as w", "w.design_id", "d.id")
    .where({ "d.slug": slug, "r.letter": letter, "w.person_id": personId })
    .whereNull("w.until_at")
    .modify((query) => void (lock && query.forUpdate("r", "t")))
    .first({
      ...{ revisionId: "r.id", designId: "d.id", designName: "d.name", letter: "r.letter", sentInAt: "r.sent_in_at" },
      ...{ material: "t.material", spacerMm: "t.spacer_mm", struts: "t.struts" },
      ...{ inletStack: "t.inlet_stack", inletStackMm: "t.inlet_stack_mm" },
      ...{ declared: "t.traits_declared", holds: "t.holds" },
    });
  if (!row) return undefined;
  const { sentInAt, spacerMm, struts, inletStack, inletStackMm, declared, holds, ...rest } = row;
  const rotors = await db("rotor")
    .where({ revision_id: row.revisionId })
    .orderBy("position")
    .select({ ...rotorColumns, position: "position", declared: "traits_declared", holds: "holds" });
  return {
    ...rest,
    sentIn: sentInAt !== null,
    whole: { spacerMm, struts, inletStack, inletStackMm, declared, holds },
    rotors: rotors.map(({ position, declared: said, holds: which, ...held }) => ({
      ...{ position, held, declared: said, holds: which },
    })),
  };
}

export interface TraitsToKeep {
  held: Values;
  read: Values;
  declared: Values;
  holds: Holds;
}

/** Writes what was read, declared and which holds; rotors that are no longer counted go. */
export async function keepTraits(
  db: Handle,
  { revisionId, whole, rotors }: { revisionId: string; whole: TraitsToKeep; rotors: readonly TraitsToKeep[] },
): Promise<void> {
  await db("revision_trait")
    .where({ revision_id: revisionId })
    .update({
      stages: rotors.length,
      counter_rotating: db.raw("counter_rotating and ? >= 2", [rotors.length]),
      spacer_mm: whole.held.spacerMm,
      struts: whole.held.struts,
      inlet_stack: whole.held.inletStack ?? db.ref("inlet_stack"),
      inlet_stack_mm: whole.held.inletStackMm ?? db.ref("inlet_stack_mm"),
      traits_read: JSON.stringify(whole.read),
      traits_declared: JSON.stringify(whole.declared),
      holds: JSON.stringify(whole.holds),
    });
  await db("rotor").where({ revision_id: revisionId }).delete();
  await db("rotor").insert(
    rotors.map(({ held, read, declared, holds }, n) => ({
      revision_id: revisionId,
      position: n + 1,
      ...Object.fromEntries(Object.entries(rotorColumns).map(([name, column]) => [column, held[name]])),
      traits_read: JSON.stringify(read),
      traits_declared: JSON.stringify(declared),
      holds: JSON.stringify(holds),
    })),
  );
}
