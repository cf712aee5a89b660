"use client";

import { useRouter } from "next/navigation";
import { ActForm, type ActFormProps } from "@/components/ui/act/act-form";
import type { ActField } from "@/components/ui/act/act-values";
import {
  useAddBaseline,
  useAddBaselineUnit,
  useAddBench,
  useAddBenchVersion,
  useAddBudget,
  useAddBudgetPart,
  useAddPosition,
  useAddProtocol,
  useAddProtocolVersion,
} from "@/lib/client/host";

type Words = Pick<ActFormProps, "label" | "words" | "busyWords">;
const adding = (label: string): Words => ({ label, words: label, busyWords: "Adding …" });

/** A form that shows the page anew once it is done. */
export function HostForm(props: ActFormProps) {
  const router = useRouter();
  return (
    <ActForm
      {...props}
      onDone={() => {
        props.onDone?.();
        router.refresh();
      }}
    />
  );
}

const slugField: ActField = { name: "slug", label: "Address", hint: "Lower case and hyphens; it stays for ever." };
const nameField: ActField = { name: "name", label: "Name" };
const description: ActField = { name: "description", label: "Description", kind: "area", optional: true };

export function AddBenchForm() {
  return <HostForm {...adding("Add a bench")} work={useAddBench()} fields={[slugField, nameField, description]} />;
}

const versionFields: readonly ActField[] = [
  { name: "cooler", label: "Cooler" },
  { name: "heatSource", label: "Heat source" },
  { name: "temperatureSensors", label: "Temperature sensors" },
  { name: "microphone", label: "Microphone" },
  { name: "calibrator", label: "Calibrator" },
  { name: "calibratorLevelDb", label: "Calibrator's level", kind: "number", unit: "dB", defaultValue: "94" },
  {
    name: "microphoneDistanceMm",
    label: "Microphone's distance",
    kind: "number",
    unit: "mm",
    defaultValue: "100",
    hint: "From the inlet-side mounting flange.",
  },
  { name: "changeReason", label: "What changed, and why" },
];

export function AddBenchVersionForm({ benchId }: { benchId: string }) {
  return <HostForm {...adding("Add a bench version")} work={useAddBenchVersion(benchId)} fields={versionFields} />;
}

const positionFields: readonly ActField[] = [
  { name: "name", label: "Name of the position", defaultValue: "on axis" },
  { name: "distanceMm", label: "Distance", kind: "number", unit: "mm", defaultValue: "100" },
  { name: "angleDeg", label: "Angle to the axis", kind: "number", unit: "°", defaultValue: "0" },
];

export function AddPositionForm({ benchVersionId }: { benchVersionId: string }) {
  return (
    <HostForm {...adding("Add a microphone position")} work={useAddPosition(benchVersionId)} fields={positionFields} />
  );
}

export function AddBudgetForm({ benchVersionId }: { benchVersionId: string }) {
  const fields: readonly ActField[] = [{ name: "note", label: "Note to the budget", optional: true }];
  return <HostForm {...adding("Add a budget version")} work={useAddBudget(benchVersionId)} fields={fields} />;
}

const choices = (...values: string[]) => values.map((value) => ({ value, label: value.replaceAll("_", " ") }));

const partFields: readonly ActField[] = [
  {
    name: "quantity",
    label: "Quantity",
    kind: "choice",
    options: [
      { value: "level_dba", label: "Level" },
      { value: "delta_t_k", label: "ΔT" },
    ],
  },
  { name: "name", label: "Name of the part" },
  {
    name: "kind",
    label: "Kind",
    kind: "choice",
    options: choices("own_run", "own_mount", "shared_offset", "shared_gain"),
  },
  { name: "u", label: "Standard uncertainty", kind: "number" },
  { name: "unit", label: "Unit", kind: "choice", options: choices("dB", "K", "relative") },
  { name: "evaluation", label: "Type", kind: "choice", options: choices("A", "B") },
  {
    name: "distribution",
    label: "Distribution",
    kind: "choice",
    options: choices("normal", "rectangular", "triangular", "arcsine", "student"),
  },
  { name: "dof", label: "Degrees of freedom", kind: "number", optional: true, hint: "Empty: known exactly." },
  { name: "source", label: "Source" },
];

export function AddBudgetPartForm({ budgetId }: { budgetId: string }) {
  return <HostForm {...adding("Add a part")} work={useAddBudgetPart(budgetId)} fields={partFields} />;
}

export function AddProtocolForm() {
  return <HostForm {...adding("Add a protocol")} work={useAddProtocol()} fields={[slugField, nameField]} />;
}

const protocolFields: readonly ActField[] = [
  { name: "heatLoadW", label: "Heat load", kind: "number", unit: "W" },
  { name: "setSpeeds", label: "Set speeds", kind: "numbers", unit: "rpm", hint: "Several, with blanks between." },
  { name: "mounts", label: "Mounts of an entry", kind: "number", defaultValue: "3" },
  { name: "runsPerMount", label: "Runs a mount and set speed", kind: "number", defaultValue: "1" },
  { name: "backgroundGrade", label: "Background grade", kind: "choice", options: choices("engineering", "survey") },
  { name: "minutesPerRun", label: "Time of a run", kind: "number", unit: "min", defaultValue: "12" },
  { name: "minutesPerMount", label: "Time of a mount", kind: "number", unit: "min", defaultValue: "15" },
];

export function AddProtocolVersionForm({ protocolId }: { protocolId: string }) {
  return (
    <HostForm {...adding("Add a protocol version")} work={useAddProtocolVersion(protocolId)} fields={protocolFields} />
  );
}

export function AddBaselineForm() {
  const fields: readonly ActField[] = [
    slugField,
    nameField,
    description,
    { name: "blades", label: "Blades", kind: "number", optional: true },
  ];
  return <HostForm {...adding("Add a baseline")} work={useAddBaseline()} fields={fields} />;
}

export function AddBaselineUnitForm({ baselineId }: { baselineId: string }) {
  const fields: readonly ActField[] = [
    { name: "serial", label: "Serial" },
    { name: "inServiceFrom", label: "In service from", kind: "time" },
  ];
  return <HostForm {...adding("Add a unit")} work={useAddBaselineUnit(baselineId)} fields={fields} />;
}
