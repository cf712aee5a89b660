import { levelDba, referenceFan, resistanceKPerW, type ToyFan } from "@/db/seeds/demo/toy-model";
import type { EqualNoise, Figure, Snapshot, SnapshotPoint } from "@/lib/contracts/publication";
import type { Random } from "@/lib/science/statistics/random";

const powerW = 150;
const setSpeeds = [750, 1100, 1450, 1800] as const;
const speedMax = 1800;
const speedMin = 750;

export interface DrawnFigures {
  points: SnapshotPoint[];
  baselinePoints: SnapshotPoint[];
  against: Snapshot["against"];
  equalNoise: EqualNoise[];
  equalCooling: Snapshot["equalCooling"];
  loudnessSone: number;
}

const round = (value: number): number => Number(value.toPrecision(5));
const figure = (value: number, u: number, dof: number): Figure => ({ value: round(value), u: round(u), dof });

/** Speed at which the model's fan has a level; the model's level rises by 48 dB a decade of speed. */
const speedAt = (fan: ToyFan, dba: number): number => speedMax * 10 ** ((dba - levelDba(fan, speedMax)) / 48);
const withinSpeeds = (speed: number): boolean => speed >= speedMin && speed <= speedMax;

function pointAt(fan: ToyFan, setSpeed: number, dof: number): SnapshotPoint {
  const dba = levelDba(fan, setSpeed);
  const resistance = resistanceKPerW(fan, setSpeed);
  return {
    setSpeed,
    speedsRpm: fan.rotors.map(() => setSpeed),
    levelReadDba: round(dba),
    backgroundDba: null,
    level: { ...figure(dba, 0.5, dof), upperBound: false, correctionDb: 0 },
    deltaT: figure(powerW * resistance, 0.35, dof),
    resistance: figure(resistance, 0.0024, dof),
    powerW,
    runs: 3,
    mounts: 3,
    readingIds: [],
    otherPositions: [],
  };
}

/** Resistance 0.2 K/W is the model's floor; what lies above it falls with speed to the power 0.655. */
function coolingSpeed(fan: ToyFan, resistance: number): number {
  const above = resistanceKPerW(fan, speedMax) - 0.2;
  return speedMax * (above / (resistance - 0.2)) ** (1 / 0.655);
}

/**
 * An invented entry's figures straight from the toy model, without any readings: what the demo of many designs shows.
 * Levels in dB(A), ΔT in K at 150 W; entries that don't reach a level say so, as measured ones do.
 */
export function drawFigures(
  random: Random,
  fan: ToyFan,
  levelsDba: readonly number[],
  headlineDba: number,
): DrawnFigures {
  const dof = 6 + random.below(30);
  const uRatio = 0.005 + 0.004 * random.uniform();
  const equalNoise = levelsDba.map((level): EqualNoise => {
    const [own, base] = [speedAt(fan, level), speedAt(referenceFan, level)];
    if (!withinSpeeds(own)) return { levelDba: level, why: "entry-not-reached" };
    if (!withinSpeeds(base)) return { levelDba: level, why: "baseline-not-reached" };
    const [r, b] = [resistanceKPerW(fan, own), resistanceKPerW(referenceFan, base)];
    return {
      levelDba: level,
      ratio: figure(r / b, uRatio, dof),
      deltaT: figure(powerW * r, 0.35, dof),
      difference: figure(powerW * (r - b), powerW * b * uRatio, dof),
      upperBound: false,
    };
  });
  const matched = coolingSpeed(fan, resistanceKPerW(referenceFan, speedAt(referenceFan, headlineDba)));
  const points = setSpeeds.map((speed) => pointAt(fan, speed, dof));
  const baselinePoints = setSpeeds.map((speed) => pointAt(referenceFan, speed, 12));
  const against = setSpeeds.map((setSpeed) => ({
    setSpeed,
    levelDifferenceDb: figure(levelDba(fan, setSpeed) - levelDba(referenceFan, setSpeed), 0.4, dof),
    levelIsBound: false,
    deltaTDifferenceK: figure(
      powerW * (resistanceKPerW(fan, setSpeed) - resistanceKPerW(referenceFan, setSpeed)),
      0.4,
      dof,
    ),
    resistanceRatio: figure(resistanceKPerW(fan, setSpeed) / resistanceKPerW(referenceFan, setSpeed), uRatio, dof),
  }));
  return {
    points,
    baselinePoints,
    against,
    equalNoise,
    equalCooling: withinSpeeds(matched)
      ? { levelDba: headlineDba, differenceDb: figure(levelDba(fan, matched) - headlineDba, 0.45, dof) }
      : null,
    // Loudness doubles with ten decibels; the factor is made up.
    loudnessSone: round(1.1 * 2 ** ((levelDba(fan, speedMax) - 40) / 10)),
  };
}
