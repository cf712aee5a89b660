import clsx from "clsx";
import type { ReactNode } from "react";

export type FoldProps = {
  title: ReactNode;
  /** Folds of one name: only one is open at a time. */
  name?: string;
  open?: boolean;
  className?: string;
  children: ReactNode;
};

/** Folded away until wanted; works without scripts. */
export function Fold({ title, name, open, className, children }: FoldProps) {
  return (
    <details className={clsx("fold", className)} name={name} open={open}>
      <summary>{title}</summary>
      <div className="fold-body">{children}</div>
    </details>
  );
}
