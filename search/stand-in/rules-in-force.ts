import type { MatchingStrategy } from "./text-match";

/** Parts of the `attribute` rule: where one of them has been run, `attribute` is passed over, and the other way round. */
const ATTRIBUTE_PARTS: readonly string[] = ["attributeRank", "wordPosition"];

/**
 * The ranking rules that the service runs, in its order: each one once; `attribute` and its two parts don't go
 * together, and whichever comes first holds. `words` is put before the first rule about words where the settings
 * leave it out or behind, and left out when all words are required anyway.
 */
export function rulesInForce(rules: readonly string[], strategy: MatchingStrategy): string[] {
  const kept: string[] = [];
  for (const rule of withWords(rules, strategy)) {
    const isBarred =
      rule === "attribute"
        ? ATTRIBUTE_PARTS.some((part) => kept.includes(part))
        : ATTRIBUTE_PARTS.includes(rule) && kept.includes("attribute");
    if (!isBarred && !kept.includes(rule)) kept.push(rule);
  }
  return kept;
}

function withWords(rules: readonly string[], strategy: MatchingStrategy): readonly string[] {
  if (strategy === "all") return rules.filter((rule) => rule !== "words");
  const first = rules.findIndex((rule) => rule !== "sort" && !rule.includes(":"));
  if (first < 0 || rules[first] === "words") return rules;
  const rest = rules.filter((rule) => rule !== "words");
  return [...rest.slice(0, first), "words", ...rest.slice(first)];
}
