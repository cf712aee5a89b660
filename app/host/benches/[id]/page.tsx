import type { Metadata } from "next";
import Link from "next/link";
import { BudgetDesk } from "@/components/host/budget-desk";
import { ChangeForm, StartBenchSession } from "@/components/host/control-forms";
import { ChangeList, SessionList } from "@/components/host/control-parts";
import { KeepOutsPart } from "@/components/host/keep-out-parts";
import { Section } from "@/components/ui/sheet";
import { orPageState, personForPage } from "@/lib/auth/page";
import { readBenchControl } from "@/lib/server/baselines/read-bench-control";
import { readBenchSetup } from "@/lib/server/benches/benches";
import { readKeepOuts } from "@/lib/server/benches/keep-outs";
import { idParams } from "@/lib/contracts/base";
import { notFound } from "next/navigation";

export const metadata: Metadata = { title: "Bench version" };

export default async function BenchVersionPage({ params }: { params: Promise<{ id: string }> }) {
  const asked = idParams.safeParse(await params);
  if (!asked.success) notFound();
  const { id } = asked.data;
  const path = `/host/benches/${id}`;
  const actor = await personForPage(path);
  const control = await orPageState(readBenchControl(actor, { benchVersionId: id }), path);
  const setup = await orPageState(readBenchSetup(actor), path);
  const keepOuts = await orPageState(readKeepOuts(actor, { benchVersionId: id }), path);
  const version = setup.benches.flatMap((bench) => bench.versions).find((each) => each.id === id);
  if (!version) notFound();
  const speeds = control.qualifiedSpeeds;
  return (
    <>
      <Section
        id="bench"
        title={control.bench}
        level={1}
        aside={<Link href="/host/benches">Benches and protocols</Link>}
      >
        <p role="status">
          {speeds.length > 0
            ? `Qualified at ${speeds.join(", ")}: ten remounts of the baseline stand behind its agreed values.`
            : "Not qualified: no season opens on it until ten remounts of the baseline were run."}
        </p>
      </Section>
      <Section id="start" title="Qualify it, or bridge two units" tone="bar">
        <StartBenchSession benchVersionId={id} setup={setup} budgets={version.budgets} checklist={control.checklist} />
      </Section>
      <Section id="change" title="Document a change" note="the control charts begin a new phase">
        <ChangeForm benchVersionId={id} sessions={control.sessions} />
        <ChangeList changes={control.changes} />
      </Section>
      <Section id="sessions" title="Sessions" note={`the newest ${control.sessions.length}`}>
        <SessionList sessions={control.sessions} />
      </Section>
      <Section id="keep-outs" title="Keep-out solids" note="what a fan must stay clear of around the cooler">
        <KeepOutsPart benchVersionId={id} keepOuts={keepOuts} />
      </Section>
      <Section id="budgets" title="Uncertainty budget" tone="bar" note="a change is a new version">
        <BudgetDesk benchVersionId={id} budgets={version.budgets} />
      </Section>
    </>
  );
}
