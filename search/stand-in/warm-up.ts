import { facetSearch, search } from "./search";
import { SearchIndex } from "./search-index";
import { readFacetSearch, readSearch } from "./search-params";

const ROUNDS = 30;

/** Runs searches on a throwaway index, so that the first ones of a reader don't wait for code to be compiled. */
export function warmUp(): void {
  const index = new SearchIndex("warm-up", "id", new Date(0).toISOString());
  index.changeSettings({ filterableAttributes: ["kind", "size"], sortableAttributes: ["size"] });
  for (let id = 0; id < 20; id += 1) {
    index.put(String(id), { id, name: `word number ${id}`, kind: `kind ${id % 3}`, size: id });
  }
  index.prepare();
  for (let round = 0; round < ROUNDS; round += 1) {
    const options = { allowContains: false, texts: new Map(), now: () => performance.now(), requestUid: "" };
    const common = { q: "wrod numb", filter: 'kind = "kind 1" AND size >= 2' };
    const shown = {
      attributesToHighlight: ["*"],
      showMatchesPosition: true,
      sort: ["size:desc"],
      facets: ["kind", "size"],
    };
    search(index, readSearch({ ...common, ...shown }), options);
    facetSearch(index, readFacetSearch({ ...common, facetName: "kind", facetQuery: "ki" }), options);
  }
}
