import { createRandom, type Random } from "@/lib/science/statistics/random";
import { fixedNames, firstWords, handles, secondWords } from "./names";
import type { ToyFan, ToyRotor } from "./toy-model";

/** One geometry of an invented design, and where it is entered. */
export interface DemoRevision {
  letter: string;
  fan: ToyFan;
  material: string;
  frameKey: string;
  licence: string;
  printTimeMin: number;
  changes: string;
}

export interface DemoDesign {
  name: string;
  slug: string;
  owner: string;
  revisions: DemoRevision[];
}

export interface DemoEntry {
  design: DemoDesign;
  revision: DemoRevision;
}

/** A round as it will be measured: which entries, and how far it gets. */
export interface DemoRound {
  season: number;
  number: number;
  entries: DemoEntry[];
  ends: "published" | "in_review" | "measuring";
}

export interface DemoWorld {
  designs: DemoDesign[];
  rounds: DemoRound[];
}

export interface DemoSize {
  seasons: number;
  roundsPerSeason: number;
  entriesPerRound: number;
}

function pick<T>(random: Random, from: readonly T[]): T {
  const one = from[random.below(from.length)];
  if (one === undefined) throw new RangeError("nothing to pick from");
  return one;
}

function between(random: Random, low: number, high: number, step: number): number {
  return Math.round((low + random.uniform() * (high - low)) / step) * step;
}

function drawRotor(random: Random, hand: "right" | "left", tipGapMm: number): ToyRotor {
  const blades = pick(random, [3, 5, 5, 7, 7, 7, 8, 9, 9, 9, 11, 11, 13, 15]);
  const solidityMid = Number(between(random, 0.55, 1.25, 0.01).toFixed(2));
  const radiusMm = 38;
  return {
    blades,
    hand,
    hubDiameterMm: between(random, 36, 48, 1),
    tipDiameterMm: Number((114 - 2 * tipGapMm).toFixed(1)),
    axialDepthMm: between(random, 15, 24, 0.5),
    pitchMidDeg: between(random, 24, 46, 0.5),
    chordMidMm: Number(((solidityMid * 2 * Math.PI * radiusMm) / blades).toFixed(1)),
    solidityMid,
    shroud: random.uniform() < 0.12,
    massG: Number((16 + 14 * solidityMid + random.uniform() * 6).toFixed(1)),
  };
}

function drawFan(random: Random): ToyFan {
  const tipGapMm = Number(between(random, 0.4, 1.8, 0.1).toFixed(1));
  const first = drawRotor(random, random.uniform() < 0.8 ? "right" : "left", tipGapMm);
  const two = random.uniform() < 0.34;
  const counterRotating = two && random.uniform() < 0.8;
  const second = two
    ? drawRotor(random, counterRotating === (first.hand === "right") ? "left" : "right", tipGapMm)
    : undefined;
  const inletStack = pick(random, ["none", "none", "none", "bellmouth", "bellmouth", "cone", "straight"] as const);
  return {
    rotors: second ? [first, second] : [first],
    counterRotating,
    spacerMm: two ? between(random, 0, 15, 1) : 0,
    inletStack,
    inletStackMm: inletStack === "none" ? 0 : between(random, 8, 28, 1),
    struts: pick(random, [0, 3, 4, 4, 5, 7]),
    tipGapMm,
    luckCooling: 0.012 * random.normal(),
    luckLevelDb: 0.5 * random.normal(),
  };
}

/** The next revision differs from the last in one trait, as a designer who wants to learn something would have it. */
function improve(random: Random, fan: ToyFan): { fan: ToyFan; changes: string } {
  const [first, ...rest] = fan.rotors;
  if (!first) throw new RangeError("a fan has a rotor");
  const choice = random.below(4);
  if (choice === 0 && fan.inletStack === "none")
    return { fan: { ...fan, inletStack: "bellmouth", inletStackMm: 20 }, changes: "Added a bellmouth of 20 mm." };
  if (choice === 1)
    return {
      fan: { ...fan, tipGapMm: Number(Math.max(0.4, fan.tipGapMm - 0.4).toFixed(1)) },
      changes: "Closed the tip gap by up to 0.4 mm.",
    };
  if (choice === 2) {
    const blades = first.blades + 2;
    return { fan: { ...fan, rotors: [{ ...first, blades }, ...rest] }, changes: "Two more blades on the first rotor." };
  }
  const pitchMidDeg = first.pitchMidDeg + (first.pitchMidDeg < 34 ? 3 : -3);
  return { fan: { ...fan, rotors: [{ ...first, pitchMidDeg }, ...rest] }, changes: "Pitch moved by 3° towards 34°." };
}

function drawName(random: Random, taken: Set<string>, index: number): string {
  const fixed = fixedNames[index];
  if (fixed) return fixed;
  for (;;) {
    const name = `${pick(random, firstWords)} ${pick(random, secondWords)}`;
    const numbered = taken.has(name) ? `${name} ${2 + random.below(98)}` : name;
    if (!taken.has(numbered)) return numbered;
  }
}

function firstRevision(random: Random): DemoRevision {
  const fan = drawFan(random);
  const material = pick(random, ["PETG", "PETG", "PETG", "PLA", "ASA", "ABS", "PC", "resin"]);
  return {
    letter: "A",
    fan,
    material,
    frameKey: random.uniform() < 0.85 ? "120x25" : "120x38",
    licence: pick(random, ["CC-BY-SA-4.0", "CC-BY-4.0", "CC0-1.0", "CC-BY-NC-SA-4.0"]),
    printTimeMin: fan.rotors.length * between(random, 140, 380, 5),
    changes: "",
  };
}

const lettersFrom = (letter: string): string => String.fromCharCode(letter.charCodeAt(0) + 1);

/**
 * The whole invented history, the same for the same seed and size. From the second season on about a third of the
 * entries are next revisions of earlier designs; the last season ends with a round in review and one being measured.
 */
export function drawWorld(seed: number, size: DemoSize): DemoWorld {
  const random = createRandom(seed);
  const designs: DemoDesign[] = [];
  const taken = new Set<string>();
  const rounds: DemoRound[] = [];
  const newDesign = (): DemoDesign => {
    const name = drawName(random, taken, designs.length);
    taken.add(name);
    const owner = designs.length === 0 ? "quillwork" : pick(random, handles);
    const design = { name, slug: name.toLowerCase().replaceAll(" ", "-"), owner, revisions: [firstRevision(random)] };
    designs.push(design);
    return design;
  };
  for (let season = 1; season <= size.seasons; season += 1) {
    const older = designs.slice();
    const usedHere = new Set<DemoDesign>();
    for (let number = 1; number <= size.roundsPerSeason; number += 1) {
      const left = season === size.seasons ? size.roundsPerSeason - number : Infinity;
      const ends = left === 0 ? "measuring" : left === 1 ? "in_review" : "published";
      const entries: DemoEntry[] = [];
      while (entries.length < (ends === "published" ? size.entriesPerRound : 6)) {
        const again = older.length > 0 && random.uniform() < 0.35 ? pick(random, older) : undefined;
        const design = again && !usedHere.has(again) ? again : newDesign();
        usedHere.add(design);
        const last = design.revisions.at(-1);
        if (!last) throw new RangeError("a design has a revision");
        if (again === design) {
          const better = improve(random, last.fan);
          design.revisions.push({ ...last, ...better, letter: lettersFrom(last.letter) });
        }
        entries.push({ design, revision: design.revisions.at(-1) ?? last });
      }
      rounds.push({ season, number, entries, ends });
    }
  }
  return { designs, rounds };
}
