import { Button } from "@/components/ui/button";
import { Field, Select } from "@/components/ui/field";
import { unitOf, type PartDraft, type PartProblems } from "./budget-draft";
import { partKinds, quantityWords } from "./budget-words";

const choices = <T extends string>(words: Readonly<Record<T, string>>) =>
  Object.entries<string>(words).map(([value, label]) => ({ value, label }));
const shapes = {
  normal: "normal",
  rectangular: "rectangular",
  triangular: "triangular",
  arcsine: "arcsine",
  student: "Student",
} as const;
const types = { A: "A: from repeats", B: "B: from certificates and judgement" } as const;

function pick<T extends string>(words: Readonly<Record<T, string>>, value: string, otherwise: T): T {
  return (Object.keys(words) as T[]).find((key) => key === value) ?? otherwise;
}

export type PartFieldsProps = {
  draft: PartDraft;
  problems: PartProblems;
  onChange: (change: Partial<PartDraft>) => void;
  onRemove: () => void;
};

/** One part of a budget, to write. */
export function PartFields({ draft, problems, onChange, onRemove }: PartFieldsProps) {
  // Nothing is wrong with a part that nobody has begun.
  const told = draft.name === "" && draft.u === "" && draft.source === "" ? {} : problems;
  return (
    <fieldset className="grid min-w-0 gap-3 border-t border-dashed border-rule pt-3">
      <legend className="sr-only">{draft.name || "A new part"}</legend>
      <div className="grid gap-3 sm:grid-cols-2 lg:grid-cols-4">
        <Field
          label="Part"
          value={draft.name}
          error={told.name}
          onChange={(e) => onChange({ name: e.currentTarget.value })}
        />
        <Select
          label="Of"
          value={draft.quantity}
          options={choices(quantityWords)}
          onChange={(e) => onChange({ quantity: pick(quantityWords, e.currentTarget.value, draft.quantity) })}
        />
        <Select
          label="Kind"
          value={draft.kind}
          options={choices(partKinds)}
          onChange={(e) => onChange({ kind: pick(partKinds, e.currentTarget.value, draft.kind) })}
        />
        <Field
          figures
          label="Standard uncertainty"
          unit={unitOf(draft) === "relative" ? "× ΔT" : unitOf(draft)}
          inputMode="decimal"
          value={draft.u}
          error={told.u}
          onChange={(e) => onChange({ u: e.currentTarget.value })}
        />
        <Select
          label="Type"
          value={draft.evaluation}
          options={choices(types)}
          onChange={(e) => onChange({ evaluation: pick(types, e.currentTarget.value, draft.evaluation) })}
        />
        <Select
          label="Distribution"
          value={draft.distribution}
          options={choices(shapes)}
          onChange={(e) => onChange({ distribution: pick(shapes, e.currentTarget.value, draft.distribution) })}
        />
        <Field
          figures
          label="Degrees of freedom"
          hint="Empty: infinitely many."
          inputMode="decimal"
          value={draft.dof}
          error={told.dof}
          onChange={(e) => onChange({ dof: e.currentTarget.value })}
        />
        <Field
          label="Source"
          value={draft.source}
          error={told.source}
          onChange={(e) => onChange({ source: e.currentTarget.value })}
        />
      </div>
      <p>
        <Button kind="quiet" small onClick={onRemove} aria-label={`Leave out ${draft.name || "this part"}`}>
          Leave it out
        </Button>
      </p>
    </fieldset>
  );
}
