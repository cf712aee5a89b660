import { BarsTable } from "@/components/ui/bars/bars-table";
import { Section } from "@/components/ui/sheet";
import type { AgreedValue, Baseline, BaselineBridge } from "@/lib/contracts/baselines";
import { formatDate } from "@/lib/format/dates";
import { writeMeasured } from "@/lib/format/measured";
import { formatNumber } from "@/lib/format/numbers";
import { levelUnit } from "@/lib/format/quantities";

type Group = { key: string; serial: string; bench: string; values: AgreedValue[] };

function groups(agreed: readonly AgreedValue[]): Group[] {
  const found = new Map<string, Group>();
  for (const value of agreed) {
    const key = `${value.serial}, ${value.bench}`;
    const group = found.get(key) ?? { key, serial: value.serial, bench: value.bench, values: [] };
    group.values.push(value);
    found.set(key, group);
  }
  return [...found.values()];
}

function AgreedTable({ group }: { group: Group }) {
  const [first] = group.values;
  if (!first) return null;
  const speeds = [...new Set(group.values.map((value) => value.setSpeed))].sort((a, b) => a - b);
  const figure = (quantity: AgreedValue["quantity"], setSpeed: number, decimals: number) => {
    const value = group.values.find((each) => each.quantity === quantity && each.setSpeed === setSpeed);
    return { figure: { value: value?.value, decimals, why: "no agreed value at this set speed" } };
  };
  const u = (quantity: AgreedValue["quantity"], setSpeed: number, decimals: number) => ({
    figure: {
      value: group.values.find((each) => each.quantity === quantity && each.setSpeed === setSpeed)?.u,
      decimals,
      why: "no agreed value at this set speed",
    },
  });
  return (
    <div>
      <h3 className="mb-1">
        Unit {group.serial} on {group.bench}
      </h3>
      <p className="small-print mb-2">
        Since {formatDate(first.from)}. {first.reason}{" "}
        {first.sessions.length > 0
          ? `From ${first.sessions.length === 1 ? "session" : "sessions"} ${first.sessions.join(", ")}.`
          : null}
      </p>
      <BarsTable
        caption={`Agreed values of unit ${group.serial} on ${group.bench}`}
        columns={[
          { key: "set", head: "Set speed", unit: "rpm" },
          { key: "level", head: "Level", unit: levelUnit(first.microphoneDistanceMm), tone: "baseline" },
          { key: "uLevel", head: "u", unit: "dB", label: "Standard uncertainty of the level" },
          { key: "resistance", head: "ΔT/P", unit: "K/W", tone: "baseline" },
          { key: "uResistance", head: "u", unit: "K/W", label: "Standard uncertainty of ΔT/P" },
        ]}
        rows={speeds.map((speed) => ({
          key: String(speed),
          cells: {
            set: { figure: { value: speed, decimals: 0 } },
            level: figure("level_dba", speed, 1),
            uLevel: u("level_dba", speed, 2),
            resistance: figure("thermal_resistance_kpw", speed, 4),
            uResistance: u("thermal_resistance_kpw", speed, 4),
          },
        }))}
      />
    </div>
  );
}

function bridgeWords(bridge: BaselineBridge): string {
  const { figure, kind, quantity } = bridge;
  const at =
    bridge.levelDba === null
      ? `${formatNumber(bridge.setSpeed ?? 0)} rpm`
      : `${formatNumber(bridge.levelDba)} ${levelUnit(bridge.microphoneDistanceMm)}`;
  const what = quantity === "level_dba" ? "level" : "ΔT/P";
  if (kind === "ratio") {
    const percent = writeMeasured({ value: 100 * figure.value, uncertainty: 100 * figure.u95, decimals: 1 }, "%");
    return `${what} of ${bridge.from} is ${percent} of ${bridge.to}’s at ${at}`;
  }
  const unit = quantity === "level_dba" ? "dB" : "K/W";
  const difference = writeMeasured({ value: figure.value, uncertainty: figure.u95, decimals: 2, signed: true }, unit);
  return `${what} of ${bridge.from} less ${bridge.to}’s is ${difference} at ${at}`;
}

/** What each unit is agreed to read on each bench version, and how one unit stands to the next; absent without any. */
export function AgreedSection({ baseline }: { baseline: Baseline }) {
  const found = groups(baseline.agreed);
  return (
    <>
      {found.length > 0 ? (
        <Section
          id="agreed"
          title="Agreed values"
          note="by unit and bench version; a new value never overwrites an old one"
        >
          <div className="grid gap-8">
            {found.map((group) => (
              <AgreedTable key={group.key} group={group} />
            ))}
          </div>
        </Section>
      ) : null}
      {baseline.bridges.length > 0 ? (
        <Section id="bridges" title="Bridges" note="from sessions that ran both units">
          <ul className="list-[square] pl-5">
            {baseline.bridges.map((bridge) => (
              <li key={`${bridge.from} ${bridge.to} ${bridge.quantity} ${bridge.levelDba} ${bridge.setSpeed}`}>
                {bridgeWords(bridge)} ({bridge.bench}).
              </li>
            ))}
          </ul>
          <p className="small-print mt-2">
            ± is 95 % coverage. A ratio to the first unit times this is a ratio to the second. Ratios to different units
            compare only through these, with their uncertainty added.
          </p>
        </Section>
      ) : null}
    </>
  );
}
