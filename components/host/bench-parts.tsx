import Link from "next/link";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { Facts } from "@/components/ui/facts";
import { Fold } from "@/components/ui/fold";
import type { BenchSetup } from "@/lib/contracts/bench-admin";
import { formatDate } from "@/lib/format/dates";
import {
  AddBaselineUnitForm,
  AddBenchVersionForm,
  AddBudgetForm,
  AddBudgetPartForm,
  AddPositionForm,
  AddProtocolVersionForm,
} from "./host-form";

type Bench = BenchSetup["benches"][number];
type Version = Bench["versions"][number];

/** A bench with its versions, each with microphone positions and budgets; what can be added stands beside it. */
export function BenchSetupPart({ bench }: { bench: Bench }) {
  return (
    <div className="mb-6">
      <h2>{bench.name}</h2>
      <p>{bench.description}</p>
      {bench.versions.map((version) => (
        <Fold key={version.id} title={`${bench.name}, version ${version.number}`}>
          <VersionPart version={version} />
        </Fold>
      ))}
      <Fold title="Add a bench version …">
        <AddBenchVersionForm benchId={bench.id} />
      </Fold>
    </div>
  );
}

function VersionPart({ version }: { version: Version }) {
  return (
    <div className="grid gap-4">
      <p>
        <Link href={`/host/benches/${version.id}`}>Qualification, documented changes and budgets of this version</Link>
      </p>
      <Facts
        facts={[
          { label: "Cooler", value: version.cooler },
          { label: "Heat source", value: version.heatSource },
          { label: "Sensors", value: version.temperatureSensors },
          { label: "Microphone", value: `${version.microphone}, ${version.microphoneDistanceMm} mm` },
          { label: "Calibrator", value: version.calibrator },
          { label: "Since", value: `${formatDate(version.validFrom)}: ${version.changeReason}` },
          {
            label: "Positions",
            value: version.positions
              .map((each) => `${each.name} (${each.distanceMm} mm, ${each.angleDeg}°)`)
              .join("; "),
          },
        ]}
      />
      <Fold title="Add a microphone position …">
        <AddPositionForm benchVersionId={version.id} />
      </Fold>
      {version.budgets.map((budget) => (
        <div key={budget.id}>
          <BarsTable
            caption={`Budget ${budget.number}${budget.frozenAt ? `, frozen ${formatDate(budget.frozenAt)}` : ""}`}
            showCaption
            columns={[
              { key: "name", head: "Part" },
              { key: "quantity", head: "Quantity" },
              { key: "u", head: "Standard uncertainty" },
              { key: "kind", head: "Kind" },
              { key: "type", head: "Type and distribution" },
              { key: "source", head: "Source" },
            ]}
            rows={budget.parts.map((part) => ({
              key: part.id,
              cells: {
                name: { words: part.name },
                quantity: { words: part.quantity === "level_dba" ? "Level" : "ΔT" },
                u: { words: `${part.u} ${part.unit}` },
                kind: { words: part.kind.replaceAll("_", " ") },
                type: {
                  words: `${part.evaluation}, ${part.distribution}${part.dof === null ? "" : `, ν = ${part.dof}`}`,
                },
                source: { words: part.source },
              },
            }))}
          />
          {budget.frozenAt === null ? (
            <Fold title={`Add a part to budget ${budget.number} …`}>
              <AddBudgetPartForm budgetId={budget.id} />
            </Fold>
          ) : null}
        </div>
      ))}
      <Fold title="Add a budget version …">
        <AddBudgetForm benchVersionId={version.id} />
      </Fold>
    </div>
  );
}

export function ProtocolSetup({ protocol }: { protocol: BenchSetup["protocols"][number] }) {
  return (
    <div className="mb-6">
      <h3>{protocol.name}</h3>
      <BarsTable
        caption={`Versions of ${protocol.name}`}
        columns={[
          { key: "number", head: "Version" },
          { key: "load", head: "Heat load", unit: "W" },
          { key: "speeds", head: "Set speeds" },
          { key: "positions", head: "Positions" },
          { key: "mounts", head: "Mounts and runs" },
          { key: "grade", head: "Background grade" },
        ]}
        rows={protocol.versions.map((version) => ({
          key: version.id,
          cells: {
            number: { words: `${version.number}${version.frozenAt ? ", frozen" : ""}` },
            load: { figure: { value: version.heatLoadW, decimals: 0 } },
            speeds: { words: `${version.setSpeeds.join(", ")} ${version.setting === "rpm" ? "rpm" : "% drive"}` },
            positions: { words: version.positions.join(", ") },
            mounts: { words: `${version.mounts} × ${version.runsPerMount}` },
            grade: { words: version.backgroundGrade },
          },
        }))}
      />
      <Fold title="Add a protocol version …">
        <AddProtocolVersionForm protocolId={protocol.id} />
      </Fold>
    </div>
  );
}

export function BaselineSetup({ baseline }: { baseline: BenchSetup["baselines"][number] }) {
  return (
    <div className="mb-6">
      <h3>{baseline.name}</h3>
      <ul className="list-[square] pl-5">
        {baseline.units.map((unit) => (
          <li key={unit.id}>
            {unit.serial}, in service from {formatDate(unit.inServiceFrom)}
            {unit.retiredAt === null ? "" : `, retired ${formatDate(unit.retiredAt)}`}
          </li>
        ))}
      </ul>
      <Fold title={`Add a unit of ${baseline.name} …`}>
        <AddBaselineUnitForm baselineId={baseline.id} />
      </Fold>
    </div>
  );
}
