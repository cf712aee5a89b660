import { describe, expect, it } from "vitest";
import { drawMesh } from "@/lib/science/geometry/drawing/draw-mesh";
import { fanDrawing } from "@/lib/science/geometry/drawing/fan-drawing";
import { joinPieces, lineLength, simplified } from "@/lib/science/geometry/drawing/polylines";
import { drawableMesh } from "@/lib/science/geometry/drawing/sharp-edges";
import { drawingSvg } from "@/lib/science/geometry/drawing/svg-text";
import { drawingOfTraits } from "@/lib/science/geometry/drawing/traits-drawing";
import { frontView, sideView, viewFrom } from "@/lib/science/geometry/drawing/view";
import { boxAsMesh } from "@/lib/science/geometry/fit/keep-out";
import { generateRotor } from "@/lib/science/geometry/rotor-generator";
import { together } from "../../factories/rotor-mesh";

/** What is expected here is elementary geometry: edges of boxes and circles whose lengths can be read off. */
const box = (min: [number, number, number], max: [number, number, number]) => boxAsMesh({ min, max });
const length = (lines: readonly (readonly number[])[]) => lines.reduce((sum, line) => sum + lineLength(line), 0);

describe("hidden lines", () => {
  it("draws a cube from its corner as nine edges, and hides the three behind", () => {
    const drawing = drawMesh(drawableMesh(box([0, 0, 0], [30, 30, 30])), viewFrom([1, 1, 1], [0, 0, 1]));
    // Isometric: every edge is √(2/3) of its length.
    expect(length(drawing.lines)).toBeCloseTo(9 * 30 * Math.sqrt(2 / 3), 0);
  });

  it("draws a cube from its front as its outline alone, each edge once", () => {
    const drawing = drawMesh(drawableMesh(box([0, 0, 0], [30, 20, 10])), frontView([0, 0, 1]));
    expect(length(drawing.lines)).toBeCloseTo(100, 0);
    expect([drawing.minX, drawing.maxX, drawing.maxY - drawing.minY]).toEqual([-15, 15, 20]);
  });

  it("never draws the diagonals that split flat faces into triangles", () => {
    const drawing = drawMesh(drawableMesh(box([0, 0, 0], [30, 30, 30])), frontView([0, 0, 1]));
    for (const line of drawing.lines) {
      for (let i = 2; i < line.length; i += 2) {
        const [dx, dy] = [(line[i] ?? 0) - (line[i - 2] ?? 0), (line[i + 1] ?? 0) - (line[i - 1] ?? 0)];
        expect(Math.min(Math.abs(dx), Math.abs(dy))).toBeLessThan(0.05);
      }
    }
  });

  it("cuts a line off where a nearer body begins", () => {
    const mesh = together(box([-50, -20, 0], [50, 20, 2]), box([-10, -30, 20], [10, 30, 22]));
    const drawing = drawMesh(drawableMesh(mesh), frontView([0, 0, 1]));
    // The near plate is whole (160), the far one lacks two pieces of 20 behind it (280 − 40).
    expect(length(drawing.lines)).toBeCloseTo(160 + 240, 0);
  });

  it("draws the joint of two shells that overlap, though no edge of the mesh is there", () => {
    const mesh = together(box([-30, -30, 0], [30, 30, 10]), box([-5, -5, 5], [5, 5, 30]));
    const drawing = drawMesh(drawableMesh(mesh), viewFrom([1, 1, 1], [0, 0, 1]));
    const joint = drawing.lines.some((line) => {
      for (let i = 0; i < line.length; i += 2) {
        // The nearest corner of the post in the plate's upper face: (5, 5, 10) about the middle (0, 0, 15).
        const [x, y] = [(5 - 5) / Math.SQRT2, (2 * -5 - 10) / Math.sqrt(6) + 0];
        if (Math.hypot((line[i] ?? 0) - x, (line[i + 1] ?? 0) - y) < 0.3) return true;
      }
      return false;
    });
    expect(joint).toBe(true);
  });

  it("draws a round rim as one closed line of the circle's length", () => {
    const rotor = generateRotor({
      blades: 3,
      hand: "right",
      helixPitchMm: 60,
      chordMm: 10,
      thicknessMm: 2,
      hubRadiusMm: 20,
      tipRadiusMm: 50,
      hubDepthMm: 30,
      shroud: { thicknessMm: 3, depthMm: 24 },
    });
    const drawing = drawMesh(drawableMesh(rotor), frontView([0, 0, 1]));
    // 192 corners of a circle of 53 mm: 0.005 % shorter than the circle.
    const rim = drawing.lines.map(lineLength).sort((a, b) => b - a)[0];
    expect(rim).toBeCloseTo(2 * Math.PI * 53, 0);
  });

  it("is the same for the same mesh, and empty for none", () => {
    const mesh = drawableMesh(box([0, 0, 0], [30, 20, 10]));
    expect(drawMesh(mesh, sideView([1, 0, 0]))).toEqual(drawMesh(mesh, sideView([1, 0, 0])));
    const none = drawableMesh({ positions: new Float64Array(), triangles: new Uint32Array() });
    expect(drawMesh(none, frontView([0, 0, 1])).lines).toEqual([]);
  });
});

describe("lines", () => {
  it("joins pieces whichever way they run, and leaves a fork alone", () => {
    expect(joinPieces([[0, 0, 1, 0], [2, 0, 1, 0], [2, 0, 3, 1]])).toHaveLength(1); // prettier-ignore
    expect(joinPieces([[0, 0, 1, 0], [1, 0, 2, 0], [1, 0, 1, 5]])).toHaveLength(3); // prettier-ignore
  });

  it("keeps within its tolerance when it drops points", () => {
    expect(simplified([0, 0, 5, 0.01, 10, 0], 0.05)).toEqual([0, 0, 10, 0]);
    expect(simplified([0, 0, 5, 1, 10, 0], 0.05)).toEqual([0, 0, 5, 1, 10, 0]);
  });
});

describe("a fan's drawing", () => {
  const rotor = { blades: 7, hand: "right", hubDiameterMm: 42, tipDiameterMm: 112, axialDepthMm: 20 } as const;
  const declared = { ...rotor, pitchMidDeg: 36, chordMidMm: 30, shroud: false };

  it("writes the diameters and depths that it was given", () => {
    const zone = { sweptDiameterMm: 112, fromMm: 5, toMm: 25 };
    const drawing = fanDrawing(box([-56, -56, -10], [56, 56, 10]), {
      axis: { pointMm: [0, 0, 0], direction: [0, 0, 1] },
      rotors: [{ ...rotor, ...zone }],
    });
    expect(drawing.front.words.map((words) => words.text)).toEqual(["Ø 112.0", "Ø 42.0"]);
    expect(drawing.side.words.map((words) => words.text)).toEqual(["20.0", "20.0", "112.0"]);
    expect(drawingSvg(drawing)).toMatch(/^<svg [^>]*viewBox="0 0 [\d.]+ [\d.]+"/);
  });

  it("draws declared traits, says so, and draws nothing for traits that make no rotor", () => {
    const drawing = drawingOfTraits({ rotors: [declared], spacerMm: 0, inletStackMm: 0 });
    expect(drawing?.from).toBe("traits");
    expect(drawing?.front.title).toContain("7 blades, right-handed");
    // Two edges and a tip for each of seven blades that leave each other free, and the hub.
    expect(drawing?.front.outlines).toHaveLength(7 * 3 + 1);
    const noDepth = drawingOfTraits({
      rotors: [{ ...declared, axialDepthMm: undefined }],
      spacerMm: 0,
      inletStackMm: 0,
    });
    expect(noDepth?.side.words.map((words) => words.text)).toEqual(["112.0"]);
    expect(drawingOfTraits({ rotors: [], spacerMm: 0, inletStackMm: 0 })).toBeUndefined();
    expect(
      drawingOfTraits({ rotors: [{ ...declared, tipDiameterMm: 40 }], spacerMm: 0, inletStackMm: 0 }),
    ).toBeUndefined();
  });
});
