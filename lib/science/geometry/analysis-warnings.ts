import type { RotorTraits } from "./analysis-types";
import type { AxisFinding } from "./axis-search";
import type { BladeRow } from "./blade-row";
import type { MeshWarning } from "./reading";
import type { ShellReport } from "./shells";

/** What the warnings of an analysis are made from. */
export interface WarningFacts {
  readonly report: ShellReport;
  /** Shells that faced inwards and were turned. */
  readonly turned: number;
  /** Tiny shells that were left out of the search. */
  readonly crumbs: number;
  readonly overlap: boolean;
  readonly soup: boolean;
  readonly watertight: boolean;
  readonly rotors: readonly RotorTraits[];
  readonly rows: readonly BladeRow[];
  readonly finding: AxisFinding | undefined;
  /** Closed, yet without a volume above zero. */
  readonly hollow: boolean;
}

const SURE = 0.75;
const UNEQUAL_SHARE = 0.04;

/** Everything a person should know, most important first. */
export function analysisWarnings(facts: WarningFacts): MeshWarning[] {
  return [...meshWarnings(facts), ...rotorWarnings(facts)];
}

function meshWarnings({ report, turned, crumbs, overlap, soup, watertight, hollow }: WarningFacts): MeshWarning[] {
  const { edges, duplicateTriangles, copyOf } = report;
  const out: MeshWarning[] = [];
  const add = (code: string, message: string): void => void out.push({ code, message });
  if (!watertight) {
    add(
      "not-watertight",
      `${edges.openEdges} open and ${edges.misorientedEdges} misoriented edges: volume and mass can't be known.`,
    );
  }
  if (soup) {
    add(
      "too-scattered",
      `${edges.shellCount} shells, or triangles too large and many: neither rotors nor overlaps were looked for, so there is no volume.`,
    );
  }
  if (edges.nonManifoldEdges > 0)
    add("non-manifold-edges", `${edges.nonManifoldEdges} edges belong to more than two triangles.`);
  if (edges.degenerateTriangles > 0)
    add("zero-area-triangles", `${edges.degenerateTriangles} triangles without area were left out.`);
  if (duplicateTriangles > 0) {
    const copies = copyOf.filter((copy) => copy !== undefined).length;
    add(
      "duplicate-triangles",
      `${duplicateTriangles} triangles are there twice (${copies} whole shells); each place counts once.`,
    );
  }
  if (turned > 0) add("inside-out", `${turned} shells faced inwards and were read as facing outwards.`);
  if (crumbs > 0)
    add("crumbs", `${crumbs} tiny shells took no part in the search for rotors; volume and bounds have them.`);
  if (overlap) {
    add(
      "shells-overlap",
      "Shells overlap: volume and mass are of their union, sampled to some tenths of a percent of what they share.",
    );
  }
  if (hollow) add("no-volume", "The mesh is closed but encloses no volume.");
  return out;
}

function rotorWarnings({ rotors, rows, finding, soup }: WarningFacts): MeshWarning[] {
  if (!finding) {
    const message = "No rotor was found: no axis shows a hub with two or more like blades around it.";
    return soup ? [] : [{ code: "no-rotor", message }];
  }
  const out: MeshWarning[] = [];
  rotors.forEach((rotor, i) => {
    const name = rotors.length > 1 ? `Rotor ${i + 1}: ` : "";
    const others = rows[i]?.otherCounts ?? [];
    if (rotor.confidence < SURE) {
      const also = others.length > 0 ? `; some cylinders showed ${others.join(", ")} blades` : "";
      out.push({
        code: "rotor-unsure",
        message: `${name}read with low confidence (${rotor.confidence.toFixed(2)})${also}. Please check.`,
      });
    }
    const equal = 360 / rotor.spacingDeg.length;
    if (rotor.spacingDeg.some((gap) => Math.abs(gap - equal) > UNEQUAL_SHARE * equal)) {
      out.push({ code: "unequal-spacing", message: `${name}the blades are not equally spaced.` });
    }
  });
  return out;
}
