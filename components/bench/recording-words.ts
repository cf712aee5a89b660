import type { SoundReportView } from "@/lib/contracts/sound-report";
import { listWords } from "@/lib/format/words";

type Match = Omit<NonNullable<SoundReportView["tones"][number]["match"]>, "alsoMatches">;

/** "blade passing, rotor 1, harmonic 2" or "interaction 1·f₁ − 2·f₂": what a tone is. */
export function matchWords({ kind, rotor, m1, m2 }: Match): string {
  if (kind === "blade-passing") {
    const harmonic = rotor === 2 ? m2 : m1;
    return `blade passing, rotor ${rotor}${harmonic === 1 ? "" : `, harmonic ${harmonic}`}`;
  }
  const terms = [
    { m: m1, name: "f₁" },
    { m: m2, name: "f₂" },
  ].toSorted((a, b) => b.m - a.m);
  const words = terms.map(({ m, name }, n) => {
    const sign = n === 0 ? (m < 0 ? "−" : "") : m < 0 ? " − " : " + ";
    return `${sign}${Math.abs(m) === 1 ? "" : `${Math.abs(m)}·`}${name}`;
  });
  return `rotor interaction ${words.join("")}`;
}

/** Prominent, not, or out of what the standard's method assesses. */
export const prominentWords = (prominent: boolean | null): string =>
  prominent === null ? "not assessable below 89.1 Hz" : prominent ? "prominent" : "no";

const time = (s: number): string => (Number.isInteger(s) ? String(s) : s.toFixed(1));

/** "5 to 6 s and 9 to 11 s". */
export const stretchWords = (stretches: readonly { fromS: number; toS: number }[]): string =>
  listWords(stretches.map(({ fromS, toS }) => `${time(fromS)} to ${time(toS)} s`));
