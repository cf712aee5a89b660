import { importsOf, type Import } from "./imports";
import { layers, packageHomes, type Layer } from "./layers";
import { isTest, sourceFiles } from "./source-files";

interface Home {
  layer: Layer;
  /** The layer's name with `*` filled in: two features are two layers. */
  name: string;
}

/** Which layer a file stands in: the longest path that fits, a fixed name before a `*` of the same depth. */
export function layerOf(file: string): Home | undefined {
  let best: (Home & { rank: number }) | undefined;
  for (const layer of layers) {
    for (const place of layer.paths) {
      const matched = match(file, place);
      if (matched === undefined) continue;
      const rank = place.split("/").length * 2 - (place.includes("*") ? 1 : 0);
      if (!best || rank > best.rank) best = { layer, name: layer.name.replace("*", matched), rank };
    }
  }
  return best;
}

/** What `*` stands for ("" without one), or undefined when the file isn't there. */
function match(file: string, place: string): string | undefined {
  if (!place.endsWith("/")) return file === place ? "" : undefined;
  const wanted = place.split("/").slice(0, -1);
  const parts = file.split("/");
  if (parts.length <= wanted.length) return undefined;
  let star = "";
  for (const [n, want] of wanted.entries()) {
    if (want === "*") star = parts[n] ?? "";
    else if (want !== parts[n]) return undefined;
  }
  return star;
}

/** All breaches of the allow-list in a tree, one line each; empty when there is none. */
export function importBreaches(root: string): string[] {
  return sourceFiles(root).flatMap((file) => {
    if (isTest(file)) return [];
    const home = layerOf(file);
    if (!home) return [`${file}: stands in no layer`];
    return importsOf(root, file).flatMap((each) => {
      const breach = each.target === undefined ? packageBreach(file, each) : layerBreach(home, each, each.target);
      return breach === undefined ? [] : [`${file}:${each.line}: ${breach}`];
    });
  });
}

function layerBreach(from: Home, each: Import, target: string): string | undefined {
  if (isTest(target)) return `imports ${each.specifier}, a test`;
  const to = layerOf(target);
  if (!to) return `imports ${each.specifier}, which stands in no layer`;
  if (to.name === from.name) return undefined;
  // A feature may not import another, though both are the layer "components/*".
  const allowed = to.layer !== from.layer && from.layer.mayImport.includes(to.layer.name);
  return allowed ? undefined : `${from.name} imports ${to.name} (${each.specifier})`;
}

function packageBreach(file: string, each: Import): string | undefined {
  const parts = each.specifier.split("/");
  const name = each.specifier.startsWith("@") ? parts.slice(0, 2).join("/") : (parts[0] ?? "");
  const homes = packageHomes[name];
  if (!homes || homes.some((home) => file === home || file.startsWith(home))) return undefined;
  return `imports ${name}, which only ${homes.join(", ")} may`;
}
