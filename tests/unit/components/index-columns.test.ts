import { describe, expect, it } from "vitest";
import { leadColumn, offeredColumns, shownColumns } from "@/components/finding/columns";
import { parseIndexQuery } from "@/lib/contracts/index-query";

const ask = (address: string) => parseIndexQuery(new URLSearchParams(address));
const offered = offeredColumns(true, false);
const keys = (address: string) => shownColumns(offered, ask(address), true).map((column) => column.key);

describe("columns of the index", () => {
  it("show what the list is sorted by, also where nobody asked for that column", () => {
    expect(keys("sort=mass").slice(0, 2)).toEqual(["mass", "equal"]);
    expect(keys("sort=-print&columns=equal,stages")).toEqual(["print", "equal", "stages"]);
    expect(keys("sort=rank&columns=equal,rank")).toEqual(["equal", "rank"]);
    expect(keys("columns=equal,stages")).toEqual(["equal", "stages"]);
  });

  it("leave out what needs one scale where there are several, and keep the usual ones for names that there aren't", () => {
    const several = offeredColumns(false, false);
    expect(shownColumns(several, ask("columns=leveldba,stages"), false).map(({ key }) => key)).toEqual(["stages"]);
    expect(shownColumns(several, ask("columns=nothing"), false).length).toBeGreaterThan(3);
  });

  it("put the figure sorted by under a drawing, else the one at equal noise", () => {
    expect(leadColumn(offered, "mass")?.key).toBe("mass");
    expect(leadColumn(offered, "name")?.key).toBe("equal");
    expect(leadColumn(offeredColumns(false, false), "published")?.key).toBe("ratio");
  });
});
