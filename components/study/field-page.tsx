import Link from "next/link";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import type { Field } from "@/lib/domain/study/field";
import { outcomeKeys, type OutcomeKey } from "@/lib/domain/study/outcomes";
import { countWords } from "@/lib/format/words";
import { FieldPlace } from "./field-place";
import { FieldBest, FieldChanges, FieldNeighbours } from "./field-tables";
import type { FieldNames } from "./field-words";
import { figureWords } from "./study-words";

export type FieldPageProps = {
  design: { name: string; slug: string };
  className: { frame: string; rotation: string } | undefined;
  field: Field | undefined;
  names: FieldNames;
  figure: OutcomeKey;
};

const rotations: Readonly<Record<string, string>> = {
  single: "one stage",
  co: "stages that turn the same way",
  counter: "counter-rotating stages",
};

/** A designer's own entries against the field: where they stand, what lies near, what the best have, what changed. */
export function FieldPage({ design, className, field, names, figure }: FieldPageProps) {
  const path = `/my/designs/${design.slug}`;
  if (!field || !className) {
    return (
      <Section id="field" title={`${design.name} in its field`} level={1} aside={<Link href={path}>The design</Link>}>
        <EmptyState title="Nothing of it is published yet">
          Once a round with one of its entries is published, it stands here among those of its class.
        </EmptyState>
      </Section>
    );
  }
  return (
    <>
      <Section id="field" title={`${design.name} in its field`} level={1} aside={<Link href={path}>The design</Link>}>
        <p>
          Its class: {countWords(field.entries, "public entry", "public entries")} for {className.frame} mm frames with{" "}
          {rotations[className.rotation] ?? className.rotation}, in the last three seasons and that of your newest
          entry. {field.oneScale} of them ran against the baseline unit of your newest entry; only those stand on one
          scale with it.
        </p>
        <nav aria-label="Figure" className="screen-only mt-3 flex flex-wrap gap-x-5">
          {outcomeKeys.map((key) => (
            <Link
              key={key}
              href={`${path}/field${key === "equal" ? "" : `?figure=${key}`}`}
              aria-current={key === figure ? "true" : undefined}
              className="aria-[current]:font-bold aria-[current]:decoration-double"
            >
              {figureWords[key].short}
            </Link>
          ))}
        </nav>
      </Section>
      <FieldPlace slug={design.slug} field={field} names={names} figure={figure} />
      <FieldNeighbours field={field} names={names} figure={figure} />
      <FieldBest field={field} />
      <FieldChanges field={field} names={names} figure={figure} />
    </>
  );
}
