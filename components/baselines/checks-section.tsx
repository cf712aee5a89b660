import { ControlChart } from "@/components/charts/control-chart";
import type { ControlPoint } from "@/components/charts/control-model";
import { Section } from "@/components/ui/sheet";
import type { BaselineCheck } from "@/lib/contracts/baselines";
import { formatDate } from "@/lib/format/dates";
import { formatNumber } from "@/lib/format/numbers";

const quantities = {
  level_dba: { words: "Level", unit: "dB(A)" },
  thermal_resistance_kpw: { words: "ΔT/P", unit: "K/W" },
  calibrator_db: { words: "Calibrator", unit: "dB" },
} as const;
/** Individuals limits at three sigma (NIST/SEMATECH e-Handbook, 6.3.2.2). */
const limitSigmas = 3;

function chartName({ serial, bench, quantity, setSpeed }: BaselineCheck): string {
  const at = setSpeed === null ? "" : ` at ${formatNumber(setSpeed)} rpm`;
  return `${quantities[quantity].words}${at}, unit ${serial}, ${bench}`;
}

function controlPoint(check: BaselineCheck, index: number): ControlPoint {
  const { centre, sigma } = check;
  const limits =
    centre === null || sigma === null
      ? {}
      : { centre, lower: centre - limitSigmas * sigma, upper: centre + limitSigmas * sigma };
  return { key: String(index), at: formatDate(check.at), value: check.value, ...limits };
}

/** Check runs of published sessions on control charts; absent while there are none. */
export function ChecksSection({ checks }: { checks: readonly BaselineCheck[] }) {
  const charts = new Map<string, BaselineCheck[]>();
  for (const check of checks) charts.set(chartName(check), [...(charts.get(chartName(check)) ?? []), check]);
  if (charts.size === 0) return null;
  return (
    <Section id="checks" title="Check runs">
      <div className="grid gap-8">
        {[...charts].map(([name, own]) => {
          const [first] = own;
          return first ? (
            <ControlChart
              key={name}
              points={own.map(controlPoint)}
              quantity={name}
              unit={quantities[first.quantity].unit}
            />
          ) : null;
        })}
      </div>
    </Section>
  );
}
