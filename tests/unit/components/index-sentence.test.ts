import { describe, expect, it } from "vitest";
import type { SentencePiece } from "@/components/ui/sentence/pieces";
import { furtherParts, sentencePieces, type SentenceInput } from "@/components/finding/sentence-pieces";
import { parseIndexQuery } from "@/lib/contracts/index-query";

const values = (...pairs: [string, number][]) => pairs.map(([value, count]) => ({ value, count }));

const answer = {
  facets: {
    rotation: values(["single", 250], ["counter", 87], ["co", 15]),
    blades1: values(["9", 81], ["11", 53], ["7", 61]),
    inlet: values(["none", 147], ["bellmouth", 123]),
    season: values(["season-2", 3], ["season-10", 4]),
    spacer: values(["true", 101], ["false", 251]),
    shroud: values(["true", 50]),
  },
  histograms: {
    gap: [
      { from: 0.4, count: 3 },
      { from: 0.5, count: 2 },
    ],
  },
};

const asked = (query: string, open?: string): SentenceInput => ({
  query: parseIndexQuery(new URLSearchParams(query)),
  answer,
  seasonTitles: { "season-2": "Season 2", "season-10": "Season 10" },
  open,
});

const aloud = (pieces: readonly SentencePiece[]) =>
  pieces.map((piece) => (piece.kind === "text" ? piece.text : piece.words)).join("");

describe("the sentence of the index", () => {
  it("reads aloud without any choice", () => {
    expect(aloud(sentencePieces(asked("")))).toBe(
      "Designs with any number of stages and any number of blades in the first, any inlet stack, printed in any " +
        "material, for a frame of any size, measured in any season.",
    );
  });

  it("reads aloud with choices, a bound and words", () => {
    const query =
      "rotation=single&rotation=counter&blades1=9&blades1=7&inlet=none&season=season-2&gap-from=0.5&gap-to=1";
    expect(aloud(sentencePieces(asked(`${query}&spacer=true&q=mill`)))).toBe(
      "Designs with one or two counter-rotating stages and 7 or 9 blades in the first, no inlet stack, printed in any " +
        "material, for a frame of any size, measured in Season 2, with a spacer, a tip gap of 0.5 to 1.0 mm, with “mill” " +
        "in name, designer or traits.",
    );
  });

  it("takes names that every object has for values like any other", () => {
    const query =
      "season=__proto__&season=constructor&rotation=constructor&tone=toString&shroud=__proto__&shroud=valueOf";
    expect(aloud(sentencePieces(asked(query)))).toBe(
      "Designs with constructor stages and any number of blades in the first, any inlet stack, printed in any material, " +
        "for a frame of any size, measured in constructor or __proto__, __proto__ or valueOf a shroud ring, toString a " +
        "prominent tone.",
    );
  });

  it("lists numbers and seasons in their own order, the newest season first", () => {
    const options = (name: string) =>
      sentencePieces(asked("")).flatMap((piece) =>
        piece.kind === "choices" && piece.name === name ? piece.options.map((option) => option.value) : [],
      );
    expect(options("blades1")).toEqual(["7", "9", "11"]);
    expect(options("season")).toEqual(["season-10", "season-2"]);
  });

  it("keeps a choice that nothing has any more, so that it can be taken back", () => {
    const part = sentencePieces(asked("material=resin")).find(
      (piece) => piece.kind === "choices" && piece.name === "material",
    );
    expect(part).toMatchObject({ options: [{ value: "resin", count: 0 }], selected: ["resin"] });
  });

  it("offers further parts that have something to choose, by an address that opens them", () => {
    expect(furtherParts(asked("blades1=7")).map(({ label, href }) => [label, href])).toEqual([
      ["Spacer", "/designs?blades1=7&open=spacer"],
      ["Tip gap", "/designs?blades1=7&open=gap-from"],
    ]);
    expect(furtherParts(asked("spacer=true", "gap-from"))).toEqual([]);
  });
});
