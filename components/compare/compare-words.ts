import { writeMeasured } from "@/lib/format/measured";
import { formatP } from "@/lib/format/numbers";
import type { ComparedEntry, ComparedPair, Contrast } from "@/lib/domain/results/compare-figures";

export type NameById = (id: string) => string;

type Quantity = { unit: string; where: string; below: string; above: string };
const cooling: Quantity = { unit: "K", where: "here", below: "cooler", above: "warmer" };
const noise: Quantity = { unit: "dB", where: "there", below: "quieter", above: "louder" };

const write = (figure: Contrast, unit: string) =>
  writeMeasured({ value: Math.abs(figure.value), uncertainty: figure.half95, decimals: 1 }, unit);

/** Above the 95 % limit and yet a tie: the lead is no larger than what a bound's correction gave. */
function tieWords({ p }: Contrast): string {
  if (p < 0.05) return "The lead is within what a background correction could give: call it a tie.";
  return `The data can’t separate them (p ${formatP(p)}): call it a tie.`;
}

function said(a: string, b: string, figure: Contrast, { unit, where, below, above }: Quantity): string {
  const size = write(figure, unit);
  if (figure.tie) return `${a} and ${b} differ by ${size} ${where}. ${tieWords(figure)}`;
  return `${a} is ${size} ${figure.value < 0 ? below : above} than ${b} ${where} (p ${formatP(figure.p)}).`;
}

function saidAsRatio(a: string, b: string, figure: Contrast): string {
  const size = `${write(figure, "%")} of the baseline’s ΔT/P, each at its season’s headline level`;
  if (figure.tie) return `${a} and ${b} differ by ${size}. ${tieWords(figure)}`;
  return `${a} cools ${figure.value < 0 ? "better" : "worse"} than ${b}, by ${size} (p ${formatP(figure.p)}).`;
}

/** One sentence a pair at equal noise: which is cooler and by how much, or that it is a tie. */
export function equalNoiseWords(pairs: readonly ComparedPair[], name: NameById, oneAxis: boolean): string[] {
  return pairs.flatMap(({ a, b, deltaTK, percent }) => {
    if (oneAxis) return deltaTK ? [said(name(a), name(b), deltaTK, cooling)] : [];
    return percent ? [saidAsRatio(name(a), name(b), percent)] : [];
  });
}

/** One sentence a pair at equal ΔT: which is quieter and by how much, or that it is a tie. */
export function equalCoolingWords(pairs: readonly ComparedPair[], name: NameById): string[] {
  return pairs.flatMap(({ a, b, coolingDb }) => (coolingDb ? [said(name(a), name(b), coolingDb, noise)] : []));
}

/** Why nothing is read off an entry at a level. */
export function whyWords({ why, levelDba }: ComparedEntry): string {
  if (why === "entry-not-reached") return `not measured at ${levelDba.toFixed(1)} dB(A), and nothing is read outside`;
  if (why === "baseline-not-reached") return `the baseline of its session doesn’t reach ${levelDba.toFixed(1)} dB(A)`;
  return `the baseline at ${levelDba.toFixed(1)} dB(A) is only known as “at most”`;
}
