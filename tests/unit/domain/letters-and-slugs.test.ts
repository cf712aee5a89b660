import { describe, expect, it } from "vitest";
import { nextLetter } from "@/lib/domain/designs/letters";
import { slugOf } from "@/lib/domain/designs/slug";

describe("a revision's next letter", () => {
  it("goes from A to Z, on to AA, and over each end", () => {
    expect([undefined, "A", "Y", "Z", "AA", "AZ", "BZ", "ZY"].map(nextLetter)).toEqual([
      "A",
      "B",
      "Z",
      "AA",
      "AB",
      "BA",
      "CA",
      "ZZ",
    ]);
  });

  it("is refused after ZZ and for what is no letter", () => {
    for (const letter of ["ZZ", "a", "AAA", "1", ""]) expect(() => nextLetter(letter)).toThrow(RangeError);
  });
});

describe("an address from a name", () => {
  it("keeps letters and figures alone, lower case, with single hyphens", () => {
    expect(slugOf("  Slow Mill — No. 2! ")).toBe("slow-mill-no-2");
    expect(slugOf("Grüne Mühle")).toBe("grune-muhle");
    expect(slugOf("風")).toBe("");
  });

  it("ends at 80 characters and never at a hyphen", () => {
    const slug = slugOf(`${"a".repeat(79)} b`);
    expect(slug).toBe("a".repeat(79));
  });
});
