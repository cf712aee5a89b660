import type { ReactNode } from "react";

export type FormulaProps = {
  /** What it gives, in words. */
  name: string;
  /** Written out, one line. */
  formula: string;
  /** Edition and clause, or that it is a house rule. */
  source: string;
  children?: ReactNode;
};

/** A formula in words with where it comes from. */
export function Formula({ name, formula, source, children }: FormulaProps) {
  return (
    <div className="grid gap-1">
      <h3>{name}</h3>
      <p className="figures max-w-none break-words">{formula}</p>
      {children ? <p>{children}</p> : null}
      <p className="small-print">{source}</p>
    </div>
  );
}
