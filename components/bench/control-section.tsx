import { BarsTable } from "@/components/ui/bars/bars-table";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import type { BenchSession } from "@/lib/contracts/bench-session";
import type { ControlCheck } from "@/lib/contracts/control";
import { speedWords } from "./words";

const quantities = {
  level_dba: { words: "Level", unit: "dB(A)", decimals: 2 },
  thermal_resistance_kpw: { words: "ΔT/P", unit: "K/W", decimals: 4 },
  calibrator_db: { words: "Calibrator", unit: "dB", decimals: 2 },
} as const;

const order = ["level_dba", "thermal_resistance_kpw", "calibrator_db"] as const;
const few = "fewer than two sessions of this phase before";

function stateWords(check: ControlCheck): string {
  if (check.out.length > 0) return `out: ${check.out.join(", ")}`;
  if (check.kind === "none") return "no limits yet";
  return check.kind === "trial" ? "in, trial limits" : "in";
}

/** Where the session's baseline and calibrator stand on their charts: live while it is open, as judged once it is closed. */
export function ControlSection({ session }: { session: BenchSession }) {
  const { control, protocol } = session;
  const out = control.filter((check) => check.out.length > 0).length;
  const checks = [...control].sort(
    (a, b) => order.indexOf(a.quantity) - order.indexOf(b.quantity) || (a.setSpeed ?? 0) - (b.setSpeed ?? 0),
  );
  const open = session.endedAt === null;
  return (
    <Section
      id="control"
      title="Control charts"
      note={open ? "as far as the readings go" : "as judged at the session's end"}
    >
      {control.length === 0 ? <p>No run of the baseline and no calibrator reading is there yet.</p> : null}
      {out > 0 ? (
        <Notice kind="wrong" title={open ? `out of control: ${out}` : `was out of control: ${out}`} live="status">
          <p>
            {open
              ? "If the session ended now, it would be held and could not be signed. Look for what changed and run the baseline again; a change made on purpose is documented by the host, and a new phase begins."
              : "A held session is not signed until another person lifts the hold, or the host documents what changed."}
          </p>
        </Notice>
      ) : null}
      {control.length > 0 ? (
        <BarsTable
          caption="The session's baseline and calibrator against their control limits"
          columns={[
            { key: "name", head: "Chart" },
            { key: "unit", head: "In" },
            { key: "value", head: "Here", tone: "baseline" },
            { key: "lower", head: "Lower limit" },
            { key: "upper", head: "Upper limit" },
            { key: "range", head: "Moving range" },
            { key: "ewma", head: "Weighted mean" },
            { key: "before", head: "Sessions before" },
            { key: "state", head: "State" },
          ]}
          rows={checks.map((check) => {
            const { words, unit, decimals } = quantities[check.quantity];
            const at = check.setSpeed === null ? "" : ` at ${speedWords(check.setSpeed, protocol.setting)}`;
            const figure = (value: number | null) => ({ figure: { value, decimals, why: few } });
            return {
              key: `${check.quantity} ${check.setSpeed}`,
              tone: check.out.length > 0 ? ("wrong" as const) : undefined,
              cells: {
                name: { words: `${words}${at}` },
                unit: { words: unit },
                value: figure(check.value),
                lower: figure(check.lower),
                upper: figure(check.upper),
                range: {
                  figure: { value: check.movingRange, decimals, why: "the first session of its chart" },
                },
                ewma: figure(check.ewma),
                before: { figure: { value: check.before, decimals: 0 } },
                state: { words: stateWords(check) },
              },
            };
          })}
        />
      ) : null}
      <p className="small-print mt-2">
        Until twenty sessions of a phase the limits are trial: 95 % prediction from those before, over all charts of the
        session together. Then they are frozen: centre ± 3 sigma from the mean moving range.
      </p>
    </Section>
  );
}
