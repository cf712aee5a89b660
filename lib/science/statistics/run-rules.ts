import { at } from "./descriptive";

/**
 * Run rules by their own words. Sources: L. S. Nelson, J. Qual. Technol. 16 (1984) 237, and the four of the Western
 * Electric handbook (1956) as in NIST/SEMATECH e-Handbook 6.3.2. All limits are strict; a point on the centre line ends a
 * run on one side; the point that completes a pattern is named.
 */
export type RunRule =
  | "one beyond 3 sigma"
  | "nine on one side"
  | "eight on one side"
  | "six steadily rising or falling"
  | "fourteen alternating"
  | "two of three beyond 2 sigma on one side"
  | "four of five beyond 1 sigma on one side"
  | "fifteen within 1 sigma"
  | "eight outside 1 sigma on either side";

/** What a baseline with fewer than thirty runs is held to: more rules mean more false alarms. */
export const BASELINE_RULES: readonly RunRule[] = [
  "one beyond 3 sigma",
  "nine on one side",
  "six steadily rising or falling",
  "two of three beyond 2 sigma on one side",
];

/** The four of Western Electric: together one false alarm in about 92 points. */
export const WESTERN_ELECTRIC_RULES: readonly RunRule[] = [
  "one beyond 3 sigma",
  "two of three beyond 2 sigma on one side",
  "four of five beyond 1 sigma on one side",
  "eight on one side",
];

/** `need` of the last `of` beyond `limit` on one side, the last one among them. */
function someBeyond(z: readonly number[], limit: number, need: number): boolean {
  const last = z[z.length - 1] ?? 0;
  return [1, -1].some((side) => last * side > limit && z.filter((value) => value * side > limit).length >= need);
}

const whole = (z: readonly number[], length: number) => z.length === length;
const steps = (z: readonly number[]) => z.slice(1).map((value, i) => Math.sign(value - at(z, i)));
const same = (signs: readonly number[]) => signs[0] !== 0 && signs.every((sign) => sign === signs[0]);

const TESTS: Record<RunRule, (last: (count: number) => number[]) => boolean> = {
  "one beyond 3 sigma": (last) => Math.abs(last(1)[0] ?? 0) > 3,
  "nine on one side": (last) => whole(last(9), 9) && same(last(9).map(Math.sign)),
  "eight on one side": (last) => whole(last(8), 8) && same(last(8).map(Math.sign)),
  "six steadily rising or falling": (last) => whole(last(6), 6) && same(steps(last(6))),
  "fourteen alternating": (last) => {
    const signs = steps(last(14));
    return whole(last(14), 14) && same(signs.map((sign, i) => (i % 2 === 0 ? sign : -sign)));
  },
  "two of three beyond 2 sigma on one side": (last) => someBeyond(last(3), 2, 2),
  "four of five beyond 1 sigma on one side": (last) => someBeyond(last(5), 1, 4),
  "fifteen within 1 sigma": (last) => whole(last(15), 15) && last(15).every((z) => Math.abs(z) < 1),
  "eight outside 1 sigma on either side": (last) => whole(last(8), 8) && last(8).every((z) => Math.abs(z) > 1),
};

/** Whether the last point of standardised values completes the pattern. */
export function completes(rule: RunRule, z: ArrayLike<number>, end: number): boolean {
  return TESTS[rule]((count) => {
    const from = Math.max(0, end + 1 - count);
    return Array.from({ length: end + 1 - from }, (_, i) => at(z, from + i));
  });
}

/** Indices (from 0) at which each rule's pattern is completed; rules that never are, are left out. z: (x − centre)/σ. */
export function runRuleFlags(z: ArrayLike<number>, rules: readonly RunRule[]): Map<RunRule, number[]> {
  const flags = new Map<RunRule, number[]>();
  for (const rule of rules) {
    const found = Array.from({ length: z.length }, (_, i) => i).filter((i) => completes(rule, z, i));
    if (found.length > 0) flags.set(rule, found);
  }
  return flags;
}
