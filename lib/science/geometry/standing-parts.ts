import type { AxisFinding } from "./axis-search";
import { ductKind, findDucts, type Duct, type DuctKind } from "./ducts";

/** An inlet stack as read: its kind, its length along the axis and how sure it is, 0–1. */
export interface InletStack {
  readonly kind: DuctKind;
  readonly lengthMm: number;
  readonly confidence: number;
}

/** A tube between the first two rotors. */
export interface Spacer {
  readonly lengthMm: number;
  readonly confidence: number;
}

/** Heights of a rotor with all that turns with it, mm. */
interface Reach {
  readonly fromMm: number;
  readonly toMm: number;
}

/** Share of its length that a duct may reach over a rotor before it is the rotor's housing (house limit). */
const OVER_ROTOR_MAX = 0.25;

/**
 * Inlet stack and spacer, where the file has them as parts of their own: a duct past one end of the rotors is the
 * stack, one between the first two rotors is the spacer. The mesh doesn't know where the air comes from: with ducts past
 * both ends the one that widens outwards is taken, else the one before the first rotor, and the confidence is halved.
 */
export function readDucts(
  finding: AxisFinding,
  rotors: readonly Reach[],
): { inletStack: InletStack | null; spacer: Spacer | null } {
  const ducts = findDucts(finding).filter((duct) => rotors.every((rotor) => over(duct, rotor) <= OVER_ROTOR_MAX));
  const middle = ({ fromMm, toMm }: Reach): number => (fromMm + toMm) / 2;
  const before = ducts.filter((duct) => rotors.every((rotor) => middle(duct) < middle(rotor)));
  const after = ducts.filter((duct) => rotors.every((rotor) => middle(duct) > middle(rotor)));
  const stacks = [stackOf(before, "upper"), stackOf(after, "lower")].filter((stack) => stack !== null);
  const [first, second] = rotors;
  const between =
    first && second ? ducts.filter((duct) => middle(duct) > middle(first) && middle(duct) < middle(second)) : [];
  return { inletStack: chosen(stacks), spacer: spacerOf(between) };
}

/** Share of a duct's length beside a rotor. */
function over(duct: Reach, rotor: Reach): number {
  const shared = Math.min(duct.toMm, rotor.toMm) - Math.max(duct.fromMm, rotor.fromMm);
  return Math.max(0, shared) / (duct.toMm - duct.fromMm);
}

/** Several ducts one after the other are one stack; its kind is that of the longest. */
function stackOf(ducts: readonly Duct[], nextToRotorsAt: "lower" | "upper"): InletStack | null {
  const longest = longestOf(ducts);
  if (!longest) return null;
  return { ...ductKind(longest, nextToRotorsAt), lengthMm: lengthOf(ducts) };
}

function spacerOf(ducts: readonly Duct[]): Spacer | null {
  const longest = longestOf(ducts);
  return longest ? { lengthMm: lengthOf(ducts), confidence: longest.closed } : null;
}

const longestOf = (ducts: readonly Duct[]): Duct | undefined =>
  [...ducts].sort((a, b) => b.toMm - b.fromMm - a.toMm + a.fromMm)[0];

const lengthOf = (ducts: readonly Duct[]): number =>
  Math.max(...ducts.map((duct) => duct.toMm)) - Math.min(...ducts.map((duct) => duct.fromMm));

function chosen([a, b]: readonly InletStack[]): InletStack | null {
  if (!a || !b) return a ?? null;
  const taken = a.kind === "straight" && b.kind !== "straight" ? b : a;
  return { ...taken, confidence: taken.confidence / 2 };
}
