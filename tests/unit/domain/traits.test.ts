import { describe, expect, it } from "vitest";
import { TRAITS, traitFault, traitOf, type Trait } from "@/lib/domain/designs/traits";

const trait = (key: string): Trait => {
  const found = traitOf(key);
  if (!found) throw new Error(`no trait ${key}`);
  return found;
};

describe("trait vocabulary", () => {
  it("has each key once, in lower case", () => {
    const keys = TRAITS.map((each) => each.key);
    expect(new Set(keys).size).toBe(keys.length);
    for (const key of keys) expect(key).toMatch(/^[a-z]+(_[a-z]+)*$/);
  });

  it("tells a value that can be from one that can't", () => {
    expect(traitFault(trait("blades"), 7)).toBeUndefined();
    expect(traitFault(trait("blades"), 7.5)).toBe("must be a whole number");
    expect(traitFault(trait("tip_gap"), -1)).toBe("must be 0 to 20 mm");
    expect(traitFault(trait("tip_gap"), Number.NaN)).toBe("must be a number");
    expect(traitFault(trait("tip_gap"), "1")).toBe("must be a number");
    expect(traitFault(trait("hand"), "left")).toBeUndefined();
    expect(traitFault(trait("hand"), "up")).toBe("is none of the choices");
    expect(traitFault(trait("shroud"), true)).toBeUndefined();
    expect(traitFault(trait("shroud"), "yes")).toBe("must be yes or no");
  });
});
