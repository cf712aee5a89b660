import { describe, expect, it } from "vitest";
import { readTyped, type ActField } from "@/components/ui/act/act-values";

const fields: readonly ActField[] = [
  { name: "load", label: "Heat load", kind: "number", unit: "W" },
  { name: "dof", label: "Degrees of freedom", kind: "number", optional: true },
  { name: "levels", label: "Levels", kind: "numbers", unit: "dB(A)" },
  { name: "at", label: "Date and time", kind: "time", optional: true },
  { name: "shroud", label: "Shroud", kind: "tick" },
];

describe("what is typed into the form of an act", () => {
  it("becomes numbers, lists and moments; an empty optional field is left out and never 0", () => {
    const typed = { load: "150,5", dof: " ", levels: "40 46,5; 52", at: "2026-03-01T09:30", shroud: "on" };
    const { values, problems } = readTyped(fields, typed);
    expect(problems).toEqual({});
    expect(values).toEqual({
      load: 150.5,
      levels: [40, 46.5, 52],
      at: new Date(2026, 2, 1, 9, 30).toISOString(),
      shroud: true,
    });
  });

  it("is refused field by field, with a reason", () => {
    const { values, problems } = readTyped(fields, { load: "", levels: "40 loud", at: "soon" });
    expect(Object.keys(problems).sort()).toEqual(["at", "levels", "load"]);
    expect(values).toEqual({ shroud: false });
  });
});
