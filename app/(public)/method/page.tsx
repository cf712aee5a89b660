import type { Metadata } from "next";
import { BudgetParts } from "@/components/method/budget-parts";
import { MethodText } from "@/components/method/method-text";
import { Section } from "@/components/ui/sheet";
import { formatDate } from "@/lib/format/dates";
import { readMethod } from "@/lib/server/reading/read-method";

export const metadata: Metadata = {
  title: "Method",
  description: "How it is measured, corrected, compared and scored: formulas with their sources, limits and cautions.",
};

export default async function MethodPage() {
  const { versions, budgets } = await readMethod();
  const [newest] = versions;
  return (
    <>
      <Section id="method" title="Method" level={1} note={newest ? `method ${newest.number} is the newest` : undefined}>
        <p>
          In three lines: a design is laid over a baseline fan that ran in the same session; the two are read where they
          are equally loud; and every figure carries what it is uncertain by and opens to its raw readings.
        </p>
        <p className="small-print mt-2">It conforms to no standard for sound power; see what it does not say.</p>
      </Section>
      <MethodText />
      <BudgetParts budgets={budgets} />
      <Section id="versions" title="Change log of the method" note="a version is frozen; a change is a new one">
        <ul className="grid gap-2">
          {versions.map((version) => (
            <li key={version.number}>
              <strong>Method {version.number}</strong>, since {formatDate(version.from)}. {version.note}
            </li>
          ))}
        </ul>
      </Section>
    </>
  );
}
