import type { Metadata } from "next";
import Link from "next/link";
import { FrameTable } from "@/components/host/frame-table";
import { AddFrameForm, ChangeFrameForm } from "@/components/host/frame-forms";
import { Fold } from "@/components/ui/fold";
import { CautionList } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import { orPageState, personForPage } from "@/lib/auth/page";
import { formatFrame } from "@/lib/format/frames";
import { readHostFrames } from "@/lib/server/benches/frames";
import { framePresetNote } from "@/lib/server/kit/read-kit";

export const metadata: Metadata = { title: "Frames" };

const cautions = [
  "Measure a frame with its fan unplugged and at rest.",
  "A bore that is larger here than in the frame lets a rotor that rubs pass as clear: a blade that rubs breaks, and its pieces fly.",
];

export default async function HostFramesPage() {
  const actor = await personForPage("/host/frames");
  const { items } = await orPageState(readHostFrames(actor), "/host/frames");
  const changeable = items.filter((frame) => frame.frozen === null);
  return (
    <>
      <Section
        id="frames"
        title="Frames"
        level={1}
        note={`presets: ${framePresetNote}`}
        aside={<Link href="/fit">Compare a model with one</Link>}
        className="grid gap-4"
      >
        {items.length === 0 ? (
          <EmptyState title="There is no frame">
            <p>A season allows frames of this list: add the first one below.</p>
          </EmptyState>
        ) : (
          <FrameTable frames={items} />
        )}
        <p className="max-w-3xl">
          A frame’s figures stand once a season opened with it or a revision was sent in for it, since designs were
          drawn to them. Another one of the same class and depth is added beside it, told apart by a word.
        </p>
      </Section>
      <Section id="set" title="Add or change" className="grid gap-4">
        <CautionList title="before you measure one" items={cautions} />
        <div>
          <Fold title="Add a frame …">
            <AddFrameForm />
          </Fold>
          {changeable.map((frame) => (
            <Fold key={frame.id} title={`Change ${formatFrame(frame.key)} mm …`}>
              <ChangeFrameForm frame={frame} />
            </Fold>
          ))}
        </div>
      </Section>
    </>
  );
}
