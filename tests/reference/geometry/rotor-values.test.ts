import { describe, expect, it, vi } from "vitest";
import { analyseMesh } from "@/lib/science/geometry/analyse";
import { generateRotor } from "@/lib/science/geometry/rotor-generator";
import { idsOf, num, nums, record, vector } from "../support/vectors";

// Every rotor is searched on some hundred thousand lines; a busy machine takes its time.
vi.setConfig({ testTimeout: 180_000 });

const ids = idsOf("T8-").filter((id) => id > "T8-10");

/** Value at a radius between stations, linear; pitch is compared through the helix, which is what stays constant. */
function between(stations: readonly { radiusMm: number; value: number }[], radiusMm: number): number {
  const above = stations.find((s) => s.radiusMm >= radiusMm) ?? stations[stations.length - 1];
  const below = [...stations].reverse().find((s) => s.radiusMm <= radiusMm) ?? stations[0];
  if (!above || !below) return NaN;
  const share = above.radiusMm > below.radiusMm ? (radiusMm - below.radiusMm) / (above.radiusMm - below.radiusMm) : 0;
  return below.value + share * (above.value - below.value);
}

// Expected: construction values of the handbook's generator (8.6), which generateRotor follows.
describe("synthetic rotors read back as they were constructed", () => {
  it.each(ids.map((id) => [vector(id).title, id]))("%s", (_, id) => {
    const { inputs, expected, tolerance } = vector(id);
    const angles = inputs["angles_rad"];
    const found = analyseMesh(
      generateRotor({
        blades: num(inputs["B"]),
        hand: num(inputs["handedness"]) > 0 ? "right" : "left",
        helixPitchMm: num(inputs["pitch_mm"]),
        chordMm: num(inputs["chord_mm"]),
        thicknessMm: num(inputs["thickness_mm"]),
        hubRadiusMm: num(inputs["r_hub"]),
        tipRadiusMm: num(inputs["r_tip"]),
        hubDepthMm: 24,
        ...(angles !== null && { anglesRad: nums(angles) }),
      }),
    );
    const [rotor] = found.rotors;
    if (!rotor) throw new Error("no rotor was found");
    expect(found.rotors).toHaveLength(1);
    expect(Math.abs(rotor.hubDiameterMm - num(expected["hub_diameter_mm"]))).toBeLessThan(
      num(tolerance["diameters_abs_mm"]),
    );
    expect(Math.abs(rotor.tipDiameterMm - num(expected["tip_diameter_mm"]))).toBeLessThan(
      num(tolerance["diameters_abs_mm"]),
    );
    for (const entry of expected["stations"] as unknown[]) {
      const station = record(entry);
      const r = num(station["r_mm"]);
      expect(rotor.blades).toBe(num(station["B"]));
      expect(rotor.hand).toBe(num(station["handedness"]) > 0 ? "right" : "left");
      const helix = rotor.stations.map((s) => ({
        radiusMm: s.radiusMm,
        value: 2 * Math.PI * s.radiusMm * Math.tan((s.pitchDeg * Math.PI) / 180),
      }));
      const pitchDeg = (Math.atan(between(helix, r) / (2 * Math.PI * r)) * 180) / Math.PI;
      expect(Math.abs(pitchDeg - num(station["pitch_angle_deg"]))).toBeLessThan(num(tolerance["pitch_angle_abs_deg"]));
      const chord = between(
        rotor.stations.map((s) => ({ radiusMm: s.radiusMm, value: s.chordMm })),
        r,
      );
      expect(Math.abs(chord / num(station["chord_mm"]) - 1)).toBeLessThan(num(tolerance["chord_rel"]));
      const solidity = (rotor.blades * chord) / (2 * Math.PI * r);
      expect(Math.abs(solidity / num(station["solidity"]) - 1)).toBeLessThan(num(tolerance["chord_rel"]));
    }
  });
});
