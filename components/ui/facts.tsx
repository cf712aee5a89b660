import type { ReactNode } from "react";

export type Fact = { label: ReactNode; value: ReactNode };

/** Labels and their values: down the page, or as a strip across it. */
export function Facts({ facts, flow = "down" }: { facts: readonly Fact[]; flow?: "down" | "strip" }) {
  if (flow === "strip") {
    return (
      <dl className="facts-strip">
        {facts.map((fact, index) => (
          <div key={index}>
            <dt>{fact.label}</dt>
            <dd>{fact.value}</dd>
          </div>
        ))}
      </dl>
    );
  }
  return (
    <dl className="facts">
      {facts.map((fact, index) => (
        <div key={index} className="contents">
          <dt>{fact.label}</dt>
          <dd>{fact.value}</dd>
        </div>
      ))}
    </dl>
  );
}
