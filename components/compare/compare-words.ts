import { writeMeasured } from "@/lib/format/measured";
import type { ComparedEntry, ComparedPair, Contrast } from "@/lib/domain/results/compare-figures";

export type NameById = (id: string) => string;

type Quantity = { unit: string; below: string; above: string };
const cooling: Quantity = { unit: "K", below: "cooler", above: "warmer" };
const ratio: Quantity = { unit: "%", below: "better cooled", above: "worse cooled" };
const noise: Quantity = { unit: "dB", below: "quieter", above: "louder" };

const write = (figure: Contrast, unit: string) =>
  writeMeasured({ value: Math.abs(figure.value), uncertainty: figure.half95, decimals: 1 }, unit);

function said(a: string, b: string, figure: Contrast, { unit, below, above }: Quantity, where: string): string {
  const size = write(figure, unit);
  if (figure.tie) return `${a} and ${b} differ by ${size} ${where}. The data can’t separate them: call it a tie.`;
  return `${a} is ${size} ${figure.value < 0 ? below : above} than ${b} ${where}.`;
}

/** One sentence a pair at equal noise: which is cooler and by how much, or that it is a tie. */
export function equalNoiseWords(pairs: readonly ComparedPair[], name: NameById, oneAxis: boolean): string[] {
  return pairs.flatMap(({ a, b, deltaTK, percent }) => {
    const figure = oneAxis ? deltaTK : percent;
    const where = oneAxis ? "here" : "in ΔT/P, each at its season’s headline level";
    return figure ? [said(name(a), name(b), figure, oneAxis ? cooling : ratio, where)] : [];
  });
}

/** One sentence a pair at equal ΔT: which is quieter and by how much, or that it is a tie. */
export function equalCoolingWords(pairs: readonly ComparedPair[], name: NameById): string[] {
  return pairs.flatMap(({ a, b, coolingDb }) => (coolingDb ? [said(name(a), name(b), coolingDb, noise, "there")] : []));
}

/** Why nothing is read off an entry at a level. */
export function whyWords({ why, levelDba }: ComparedEntry): string {
  if (why === "entry-not-reached") return `not measured at ${levelDba.toFixed(1)} dB(A), and nothing is read outside`;
  if (why === "baseline-not-reached") return `the baseline of its session doesn’t reach ${levelDba.toFixed(1)} dB(A)`;
  return `the baseline at ${levelDba.toFixed(1)} dB(A) is only known as “at most”`;
}
