import { describe, expect, it } from "vitest";
import { sessionSpectra, type SpectrumRecord } from "@/lib/domain/results/session-spectra";
import type { RunRecord, SessionRecord } from "@/lib/domain/results/session-record";
import { RECORDING_BANDS } from "@/lib/science/acoustics/bands";

const run = (runId: string, mountNumber: number, state: RunRecord["state"] = "done"): RunRecord => ({
  runId,
  entryId: "entry",
  specimenId: "copy",
  baselineUnitId: null,
  setSpeed: 1450,
  mountNumber,
  repeatNumber: 1,
  state,
  readings: [],
});

const session = (runs: RunRecord[], grade: SessionRecord["grade"] = "engineering"): SessionRecord => ({
  sessionId: "session",
  roundId: null,
  seasonId: null,
  benchVersionId: "bench",
  protocolVersionId: "protocol",
  budgetVersionId: "budget",
  baselineUnitId: "unit",
  grade,
  protocolPositions: ["on axis"],
  positions: [
    { id: "axis", name: "on axis" },
    { id: "aside", name: "at 45°" },
  ],
  budget: [],
  backgrounds: [],
  runs,
});

const spectrum = (id: string, runId: string | null, levelDb: number | null, more: Partial<SpectrumRecord> = {}) => ({
  id,
  runId,
  positionId: "axis",
  purpose: runId === null ? ("background" as const) : ("run" as const),
  levelADba: levelDb,
  bands: RECORDING_BANDS.map(({ nominalHz, midHz }) => ({ nominalHz, midHz, levelDb })),
  tones: [],
  ...more,
});

const only = (of: ReturnType<typeof sessionSpectra>) => of.get("entry")?.[0];

describe("the spectrum of a set speed", () => {
  it("is the energy mean over its runs (ISO 3744:2010 Eq. (12): 10 lg of the mean of 10^(L/10))", () => {
    const spectra = [spectrum("s1", "r1", 40), spectrum("s2", "r2", 50)];
    const found = only(sessionSpectra(session([run("r1", 1), run("r2", 2)]), spectra));
    // 10·lg((10⁴ + 10⁵)/2), by hand: 47.4036.
    expect(found?.bands[5]?.levelDb).toBeCloseTo(47.4036, 4);
    expect(found?.spectrumIds).toEqual(["s1", "s2"]);
    expect(found?.runs).toBe(2);
    expect(found?.ofProtocol).toBe(true);
  });

  it("has the background taken out, or a bound where that is too near (ISO 3744:2010 8.2.3, K₁ held at 6 dB)", () => {
    const near = [spectrum("s", "r", 40), spectrum("b", null, 30)];
    // K₁ = −10 lg(1 − 10^(−1)) = 0.4576 dB.
    expect(only(sessionSpectra(session([run("r", 1)]), near))?.bands[3]).toMatchObject({ upperBound: false });
    expect(only(sessionSpectra(session([run("r", 1)]), near))?.bands[3]?.correctedDb).toBeCloseTo(40 - 0.4576, 4);
    const nearer = [spectrum("s", "r", 40), spectrum("b", null, 38)];
    // K₁ at 6 dB: −10 lg(1 − 10^(−0.6)) = 1.2563 dB.
    const bound = only(sessionSpectra(session([run("r", 1)]), nearer))?.bands[3];
    expect(bound?.upperBound).toBe(true);
    expect(bound?.correctedDb).toBeCloseTo(40 - 1.2563, 4);
  });

  it("leaves out runs that are not done, and tells nothing that isn't known", () => {
    const runs = [run("r1", 1), run("r2", 2, "discarded")];
    const spectra = [spectrum("s1", "r1", null), spectrum("s2", "r2", 50)];
    const found = only(sessionSpectra(session(runs), spectra));
    expect(found?.spectrumIds).toEqual(["s1"]);
    expect(found?.bands[0]).toMatchObject({ levelDb: null, correctedDb: null, upperBound: null });
    expect(found?.loudness).toBeNull();
    expect(sessionSpectra(session(runs), [spectrum("s2", "r2", 50)]).size).toBe(0);
  });

  it("keeps positions apart, those of the protocol marked", () => {
    const spectra = [spectrum("s1", "r1", 40), spectrum("s2", "r1", 39, { positionId: "aside" })];
    const found = sessionSpectra(session([run("r1", 1)]), spectra).get("entry");
    expect(found?.map(({ position, ofProtocol }) => [position, ofProtocol])).toEqual([
      ["on axis", true],
      ["at 45°", false],
    ]);
  });

  it("takes its tones from the run nearest to the mean level", () => {
    const tone = (frequencyHz: number) => ({
      frequencyHz,
      levelDb: 30,
      toneToNoiseDb: 3,
      prominenceDb: 2,
      prominent: false,
      match: null,
    });
    const spectra = [40, 46, 52].map((level, i) => spectrum(`s${i}`, `r${i}`, level, { tones: [tone(100 + i)] }));
    const found = only(sessionSpectra(session([run("r0", 1), run("r1", 2), run("r2", 3)]), spectra));
    // The energy mean is 48.5 dB, 2.5 from 46 and 3.5 from 52.
    expect(found?.tonesOfRunId).toBe("r1");
    expect(found?.tones[0]?.frequencyHz).toBe(101);
  });
});
