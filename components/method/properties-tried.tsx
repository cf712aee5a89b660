import { BarsTable } from "@/components/ui/bars/bars-table";
import { Section } from "@/components/ui/sheet";
import { PROPERTIES, TRIAL_RANGE, type Property } from "@/lib/domain/scoring/properties";
import { RULES, type RuleKind } from "@/lib/domain/scoring/rules";
import tried from "./reference-checks.json";

const words: Record<Property, string> = {
  monotone: "Better when cooler or quieter",
  "unit-invariant": "Same order in other units",
  independent: "Order of two unmoved by a third",
  "speed-neutral": "Neutral to a fan’s own speed",
};

const isKind = (kind: string): kind is RuleKind => kind in RULES;

/** What the scoring rules were tried for, and where a counter-example was found. */
export function PropertiesTried() {
  const { draws, rules, levelsDba } = tried.properties;
  const [low, high] = TRIAL_RANGE.deltaTK;
  return (
    <Section id="properties" title="What scoring rules were tried for">
      <BarsTable
        caption="Properties of scoring rules, as tried on invented rounds"
        phone="fold"
        columns={[
          { key: "rule", head: "Rule" },
          ...PROPERTIES.map((property) => ({ key: property, head: words[property] })),
        ]}
        rows={rules.map(({ kind, broken }) => ({
          key: kind,
          cells: {
            rule: { words: isKind(kind) ? kind.replaceAll("-", " ") : kind },
            ...Object.fromEntries(
              PROPERTIES.map((property) => [
                property,
                {
                  words: broken.some((each) => each === property)
                    ? "counter-example found"
                    : `no counter-example in ${draws} draws`,
                },
              ]),
            ),
          },
        }))}
      />
      <p className="small-print mt-2">
        Over this range: fans of ΔT {low} to {high} K at 1 500 rpm, levels within 4 dB of the mean of the declared{" "}
        {levelsDba.join(", ")} dB(A), cooling falling with n to the power 0.5 to 0.8, speeds of 0.4 to 2 times 1 500
        rpm. What held in every draw is not proved.
      </p>
    </Section>
  );
}
