import { TONE_RANGE_HZ } from "@/lib/science/acoustics/ecma-tones";
import type { ReportedTone } from "@/lib/science/acoustics/sound-report";
import { formatNumber } from "./numbers";
import { countWords, listWords } from "./words";

/** What tells one predicted tone from another. */
export type ToneOrders = { kind: "blade-passing" | "interaction"; rotor: 1 | 2 | null; m1: number; m2: number };

/** "blade passing, stage 1", "blade passing, stage 2, 3 ×", "rotor interaction 1 f₁ + 2 f₂". `stages`: rotors in all. */
export function toneName({ kind, rotor, m1, m2 }: ToneOrders, stages: number): string {
  if (kind === "blade-passing") {
    const order = Math.abs(m1) + Math.abs(m2);
    return ["blade passing", stages > 1 ? `stage ${rotor}` : null, order > 1 ? `${order}\u00a0×` : null]
      .filter(Boolean)
      .join(", ");
  }
  const parts = [
    { order: m1, name: "f₁" },
    { order: m2, name: "f₂" },
  ].sort((a, b) => Number(a.order < 0) - Number(b.order < 0));
  const [first, second] = parts.map(({ order, name }) => `${formatNumber(Math.abs(order))} ${name}`);
  return `rotor interaction ${first} ${m1 * m2 < 0 ? "−" : "+"} ${second}`;
}

/** "yes", "no", or why it can't be told. */
export function prominentWords({ prominent, frequencyHz }: Pick<ReportedTone, "prominent" | "frequencyHz">): string {
  if (prominent !== null) return prominent ? "yes" : "no";
  return frequencyHz < TONE_RANGE_HZ.from ? `not assessable below ${TONE_RANGE_HZ.from} Hz` : "not assessable";
}

/** "2 tones are prominent: 210 Hz (blade passing) and …". `stages`: rotors in all. */
export function prominentSentence(tones: readonly ReportedTone[], stages: number): string {
  const prominent = tones.filter((tone) => tone.prominent === true);
  if (prominent.length === 0) return "No tone is prominent.";
  const names = prominent.map(
    (tone) =>
      `${formatNumber(tone.frequencyHz)} Hz (${tone.match ? toneName(tone.match, stages) : "no prediction fits"})`,
  );
  return `${countWords(names.length, "tone")} ${names.length > 1 ? "are" : "is"} prominent: ${listWords(names)}.`;
}
