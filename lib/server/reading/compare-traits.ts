import type { RotorRow, TraitRow } from "@/db/queries/shown/sheet";
import { formatFrame } from "@/lib/format/frames";
import { formatNumber } from "@/lib/format/numbers";
import type { ComparedTrait } from "@/lib/contracts/compare";

export type TraitsOf = { trait: TraitRow; rotors: readonly RotorRow[]; licence: string; designers: readonly string[] };

/** A trait's words for one revision; null where it was not declared. */
type Line = { key: string; label: string; unit?: string; say: (of: TraitsOf) => string | null };

const figure = (value: number | null, decimals: number) => (value === null ? null : formatNumber(value, { decimals }));
const yesNo = (flag: boolean) => (flag ? "yes" : "no");

/** A rotor's trait, stage by stage: "0.92 + 0.81"; null where any stage has none. `once`: what all stages share is said once. */
function byStage(
  label: string,
  key: string,
  unit: string,
  read: (rotor: RotorRow) => string | null,
  once = false,
): Line {
  return {
    key,
    label,
    ...(unit && { unit }),
    say: ({ rotors }) => {
      const said = rotors.map(read);
      if (said.length === 0 || said.includes(null)) return null;
      // "no" and "no + no" say the same; two stages of 9 blades and one of 9 don't.
      return (once ? [...new Set(said)] : said).join(" + ");
    },
  };
}

function stagesWords({ trait }: TraitsOf): string {
  if (trait.stages === 1) return "1";
  return `${trait.stages}, ${trait.counter_rotating ? "counter-rotating" : "turning the same way"}`;
}

const lines: readonly Line[] = [
  { key: "stages", label: "Stages", say: stagesWords },
  byStage("Blades", "blades", "", (rotor) => String(rotor.blades)),
  byStage("Hand", "hand", "", (rotor) => rotor.hand),
  {
    key: "inlet_stack",
    label: "Inlet stack",
    say: ({ trait }) =>
      trait.inlet_stack_mm > 0 ? `${trait.inlet_stack}, ${trait.inlet_stack_mm} mm` : trait.inlet_stack,
  },
  { key: "spacer", label: "Spacer", unit: "mm", say: ({ trait }) => figure(trait.spacer_mm, 0) },
  { key: "struts", label: "Struts", say: ({ trait }) => String(trait.struts) },
  byStage("Shroud ring", "shroud", "", (rotor) => yesNo(rotor.shroud), true),
  { key: "frame", label: "Frame", unit: "mm", say: ({ trait }) => formatFrame(trait.frame_key) },
  { key: "tip_gap", label: "Tip gap", unit: "mm", say: ({ trait }) => figure(trait.tip_gap_mm, 1) },
  byStage("Tip diameter", "tip_diameter", "mm", (rotor) => figure(rotor.tip_diameter_mm, 1)),
  byStage("Hub diameter", "hub_diameter", "mm", (rotor) => figure(rotor.hub_diameter_mm, 1)),
  byStage("Solidity at mid-span", "solidity_mid", "", (rotor) => figure(rotor.solidity_mid, 2)),
  byStage("Pitch at mid-span", "pitch_mid", "°", (rotor) => figure(rotor.pitch_mid_deg, 1)),
  byStage("Chord at mid-span", "chord_mid", "mm", (rotor) => figure(rotor.chord_mid_mm, 1)),
  byStage("Axial depth", "axial_depth", "mm", (rotor) => figure(rotor.axial_depth_mm, 1)),
  byStage("Unequal blade spacing", "unequal_spacing", "", (rotor) => yesNo(rotor.unequal_spacing), true),
  byStage("Rotor mass", "mass", "g", (rotor) => figure(rotor.mass_g, 1)),
  { key: "material", label: "Material", say: ({ trait }) => trait.material },
  { key: "print_time", label: "Print time", unit: "min", say: ({ trait }) => figure(trait.print_time_min, 0) },
  { key: "licence", label: "Licence", say: ({ licence }) => licence },
  { key: "designers", label: "Designer", say: ({ designers }) => designers.join(", ") },
];

/**
 * Every trait side by side, in the order of the entries, with whether it differs between them. Of the baselines only
 * the number of blades is declared; all else of theirs is null.
 *
 * @param baselineBlades of each baseline unit among the entries
 */
export function comparedTraits(of: readonly TraitsOf[], baselineBlades: readonly (number | null)[]): ComparedTrait[] {
  const known = new Set(baselineBlades);
  const [blades] = known.size === 1 ? [...known] : [];
  return lines.map(({ key, label, unit, say }) => {
    const values = of.map(say);
    return {
      key,
      label,
      unit: unit ?? null,
      values,
      baseline: key === "blades" && blades !== undefined && blades !== null ? String(blades) : null,
      differs: new Set(values).size > 1,
    };
  });
}
