import { methodFormulas, type FormulaKey, type MethodFormula } from "./formula-data";
import counts from "./reference-checks.json";

const checked: Readonly<Record<string, number>> = counts.formulas;

/** A formula in words, where it holds, where it comes from, and how many reference checks stand behind it. */
export function Formula({ of }: { of: FormulaKey }) {
  const { name, formula, text, range, source }: MethodFormula = methodFormulas[of];
  const count = checked[of] ?? 0;
  return (
    <div className="grid gap-1">
      <h3>{name}</h3>
      <p className="figures max-w-none break-words">{formula}</p>
      {text ? <p>{text}</p> : null}
      <p>Holds for: {range}</p>
      <p className="small-print">
        {source}{" "}
        <strong>
          {count} {count === 1 ? "reference check" : "reference checks"}.
        </strong>
      </p>
    </div>
  );
}
