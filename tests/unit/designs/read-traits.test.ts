import { describe, expect, it } from "vitest";
import { traitsRead } from "@/lib/domain/designs/read-traits";

const rotor = {
  ...{
    blades: 7,
    hand: "right" as const,
    hubDiameterMm: 40,
    tipDiameterMm: 110,
    sweptDiameterMm: 110,
    axialDepthMm: 22,
  },
  ...{ shroud: false, massG: null, stations: [], spacingDeg: [] },
} as const;

// Expected: the reading's own figures by the rule of the function's docblock; a house rule, no source.
describe("traits of what stands still", () => {
  it("an inlet stack with kind and length; a spacer in the file before the gap between the rotors", () => {
    const read = traitsRead(
      {
        ...{ rotors: [rotor, rotor], spacingsMm: [27.5], struts: 3 },
        ...{ inletStack: { kind: "bellmouth", lengthMm: 24.004 }, spacer: { lengthMm: 22.001 } },
      },
      undefined,
    );
    expect(read).toMatchObject({ inletStack: "bellmouth", inletStackMm: 24, spacerMm: 22, struts: 3 });
  });

  it("nothing where the file has none, and the gap where there is no spacer", () => {
    const none = { inletStack: null, spacer: null, struts: null };
    expect(traitsRead({ rotors: [rotor, rotor], spacingsMm: [27.5], ...none }, undefined)).toMatchObject({
      ...{ inletStack: null, inletStackMm: null, spacerMm: 27.5, struts: null },
    });
    expect(traitsRead({ rotors: [rotor], spacingsMm: [], ...none }, undefined).spacerMm).toBeNull();
  });
});
