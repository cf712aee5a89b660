import type { Metadata } from "next";
import { AddBaselineForm, AddBenchForm, AddProtocolForm } from "@/components/host/host-form";
import { BaselineSetup, BenchSetupPart, ProtocolSetup } from "@/components/host/bench-parts";
import { Fold } from "@/components/ui/fold";
import { Section } from "@/components/ui/sheet";
import { orPageState, personForPage } from "@/lib/auth/page";
import { readBenchSetup } from "@/lib/server/benches/benches";

export const metadata: Metadata = { title: "Benches and protocols" };

export default async function HostBenchesPage() {
  const actor = await personForPage("/host/benches");
  const setup = await orPageState(readBenchSetup(actor), "/host/benches");
  return (
    <>
      <Section
        id="benches"
        title="Benches and protocols"
        level={1}
        note="Nothing is changed once it was measured with: a change is a new version."
      >
        {setup.benches.map((bench) => (
          <BenchSetupPart key={bench.id} bench={bench} />
        ))}
        <Fold title="Add a bench …">
          <AddBenchForm />
        </Fold>
      </Section>
      <Section id="protocols" title="Protocols">
        {setup.protocols.map((protocol) => (
          <ProtocolSetup key={protocol.id} protocol={protocol} />
        ))}
        <Fold title="Add a protocol …">
          <AddProtocolForm />
        </Fold>
      </Section>
      <Section id="baselines" title="Baselines">
        {setup.baselines.map((baseline) => (
          <BaselineSetup key={baseline.id} baseline={baseline} />
        ))}
        <Fold title="Add a baseline …">
          <AddBaselineForm />
        </Fold>
      </Section>
    </>
  );
}
