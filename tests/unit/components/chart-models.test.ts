import { describe, expect, it } from "vitest";
import { controlSummary, controlTable, outOfControl } from "@/components/charts/control-model";
import { coolingSummary, coolingTable, deltaTQuantity } from "@/components/charts/cooling-model";
import { chartBands, markedTones } from "@/components/charts/spectrum-marks";
import { bandName, bandOf, spectrumSummary, spectrumTable, tonesByBand } from "@/components/charts/spectrum-model";
import { prominentSentence, prominentWords, toneName } from "@/lib/format/tones";

const nominal = [31.5, 40, 50, 63, 80, 100, 125, 160, 200, 250, 315, 400, 500, 630, 800, 1000, 1250, 1600];
const bands = nominal.map((nominalHz) => ({ nominalHz, levelDb: 30 }));

// Band edges: mid-band 1000·10^(n/10) with edges at ·10^(±1/20), IEC 61260-1:2014, value from memory.
describe("tones fall into the band that holds them", () => {
  it("takes 1 kHz ± its edges 891.25 Hz and 1122.02 Hz", () => {
    const kilo = nominal.indexOf(1000);
    expect(bandOf(bands, 891.3)).toBe(kilo);
    expect(bandOf(bands, 891.2)).toBe(kilo - 1);
    expect(bandOf(bands, 1122)).toBe(kilo);
    expect(bandOf(bands, 1122.1)).toBe(kilo + 1);
    expect(bandOf(bands, 20)).toBeUndefined();
  });

  it("leaves no gap between neighbouring bands", () => {
    for (let hz = 29; hz < 1700; hz += 0.5) expect(bandOf(bands, hz)).toBeTypeOf("number");
  });

  it("marks a band that holds both kinds as both", () => {
    const tones = tonesByBand(bands, [
      { frequencyHz: 331, kind: "blade-passing", name: "blade passing" },
      { frequencyHz: 340, kind: "interaction", name: "rotor interaction" },
    ]);
    expect(tones[nominal.indexOf(315)]).toMatchObject({ solid: true, hatched: true });
    expect(tones.filter((band) => band.names.length > 0)).toHaveLength(1);
  });

  it("names bands as people do", () => {
    expect([31.5, 800, 1000, 1250].map(bandName)).toEqual(["31.5", "800", "1k", "1.25k"]);
  });
});

describe("the spectrum's words and table", () => {
  const tone = (frequencyHz: number, m1: number, m2: number, prominent: boolean | null) => ({
    frequencyHz,
    levelDb: 40,
    toneToNoiseDb: 9,
    prominenceDb: 9,
    prominent,
    match: {
      kind: m1 === 0 || m2 === 0 ? ("blade-passing" as const) : ("interaction" as const),
      rotor: m2 === 0 ? (1 as const) : m1 === 0 ? (2 as const) : null,
      m1,
      m2,
      strutModes: null,
      residualHz: 0.2,
      alsoMatches: [],
    },
  });

  it("name tones by what makes them: m·B·n/60 of a stage, or m₁f₁ + m₂f₂ (kinematics)", () => {
    const named = (m1: number, m2: number, stages = 2) => toneName(tone(1, m1, m2, false).match, stages);
    expect(named(1, 0, 1)).toBe("blade passing");
    expect(named(0, 3)).toBe("blade passing, stage 2, 3\u00a0×");
    expect(named(1, 2)).toBe("rotor interaction 1 f₁ + 2 f₂");
    expect(named(-1, 2)).toBe("rotor interaction 2 f₂ − 1 f₁");
  });

  it("mark tones that fit a prediction, and name the prominent ones and each stage's first", () => {
    const marked = markedTones([tone(210, 1, 0, false), tone(420, 2, 0, false), tone(510, 1, 2, true)], 2);
    expect(marked.map(({ kind, named }) => [kind, named])).toEqual([
      ["blade-passing", true],
      ["blade-passing", false],
      ["interaction", true],
    ]);
    expect(markedTones([{ ...tone(300, 1, 0, true), match: null }], 1)).toEqual([]);
  });

  it("tell what is prominent, and never call a tone below 89.1 Hz not prominent (ECMA-418-1:2024, clause 8)", () => {
    expect(prominentWords(tone(80, 1, 0, null))).toContain("89.1 Hz");
    expect(prominentWords(tone(300, 1, 0, false))).toBe("no");
    expect(prominentSentence([tone(80, 1, 0, null)], 1)).toBe("No tone is prominent.");
    expect(prominentSentence([tone(210, 1, 0, true)], 1)).toContain("210 Hz (blade passing)");
  });

  it("carry every band of both, a bound as one, and say which band is loudest", () => {
    const own = chartBands([
      { nominalHz: 100, levelDb: 30, correctedDb: 28, upperBound: true },
      { nominalHz: 125, levelDb: 45, correctedDb: 45, upperBound: false },
      { nominalHz: 160, levelDb: null, correctedDb: null, upperBound: null },
    ]);
    const line = { key: "baseline", name: "baseline", bands: [{ nominalHz: 100, levelDb: 33 }] };
    const { rows } = spectrumTable(own, [], "dB @ 100 mm", line);
    expect(rows[0]?.cells.level).toMatchObject({ figure: { value: 28, bound: "upper" } });
    expect(rows[0]?.cells.baseline).toMatchObject({ figure: { value: 33 } });
    expect(rows[1]?.cells.baseline).toMatchObject({ figure: { value: undefined, why: "not measured" } });
    expect(rows[2]?.cells.level).toMatchObject({ figure: { value: undefined, why: "not measured" } });
    const said = spectrumSummary(own, [], "dB @ 100 mm", line);
    expect(said).toContain("125 Hz with 45.0 dB @ 100 mm");
    expect(said).toContain("of baseline it is 100 Hz with 33.0");
  });
});

describe("check runs", () => {
  const point = { key: "a", at: "S1", value: 50, lower: 49, upper: 51 };

  it("are out of control only beyond a limit, on either side", () => {
    expect(outOfControl(point)).toBeUndefined();
    expect(outOfControl({ ...point, value: 51 })).toBeUndefined();
    expect(outOfControl({ ...point, value: 51.01 })).toContain("above");
    expect(outOfControl({ ...point, value: 48.9 })).toContain("below");
    expect(outOfControl({ ...point, ewma: 50.6, ewmaUpper: 50.5 })).toContain("weighted mean");
    expect(outOfControl({ ...point, value: undefined })).toBeUndefined();
  });

  it("say a missing run and missing limits with a reason, never as 0", () => {
    const { rows } = controlTable([{ key: "a", at: "S1", value: undefined, why: "supply failed" }], "Level", "dB");
    expect(rows[0]?.cells.value).toEqual({ figure: { value: undefined, decimals: 2, why: "supply failed" } });
    expect(controlSummary([], "Level", "dB")).toContain("no check runs");
  });
});

describe("the cooling chart's words and table", () => {
  const series = {
    key: "h",
    name: "Heronwing B",
    points: [
      { levelDba: 55.1, cooling: 54.3 },
      { levelDba: 38.2, cooling: 71.4, levelU95Db: 0.9, upperBound: true },
    ],
  };

  it("say the span in order of level, with the distance", () => {
    const words = coolingSummary([series, { key: "n", name: "Empty", points: [] }], deltaTQuantity, 100);
    expect(words).toContain("Heronwing B from 71.4 K at 38.2 to 54.3 K at 55.1 dB(A) @ 100 mm");
    expect(words).toContain("Empty has no points");
  });

  it("carry every point, and an upper bound as one", () => {
    const { rows } = coolingTable([series], deltaTQuantity, 100);
    expect(rows).toHaveLength(2);
    expect(rows[1]?.cells.level).toMatchObject({ figure: { value: 38.2, uncertainty: 0.9, bound: "upper" } });
  });
});
