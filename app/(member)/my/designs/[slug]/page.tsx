import type { Metadata } from "next";
import Link from "next/link";
import { SendInForm } from "@/components/designs/entry-forms";
import { OwnEntries } from "@/components/designs/own-entries";
import { RevisionForm } from "@/components/designs/revision-form";
import { Section } from "@/components/ui/sheet";
import { orPageState, personForPage } from "@/lib/auth/page";
import type { OwnDesign } from "@/lib/contracts/own-designs";
import { nextLetter } from "@/lib/domain/designs/letters";
import { formatFrame } from "@/lib/format/frames";
import { readOwnChoices, readOwnDesign } from "@/lib/server/designs/own-designs";

export const metadata: Metadata = { title: "My design" };

const rotorWords = ({ rotors }: OwnDesign["revisions"][number]) =>
  rotors.map((rotor) => `${rotor.blades} blades, ${rotor.hand}-handed`).join("; ");

export default async function MyDesignPage({ params }: { params: Promise<{ slug: string }> }) {
  const { slug } = await params;
  const path = `/my/designs/${slug}`;
  const actor = await personForPage(path);
  const [design, choices] = await orPageState(
    Promise.all([readOwnDesign(actor, { slug }), readOwnChoices(actor)]),
    path,
  );
  const last = design.revisions.at(-1);
  const latestIsOut = last === undefined || last.sentInAt !== null;
  return (
    <>
      <Section
        id="design"
        title={design.name}
        level={1}
        note={design.summary}
        aside={
          design.isPublic ? (
            <span className="flex flex-wrap gap-x-5">
              <Link href={`/designs/${design.slug}`}>Its sheet</Link>
              <Link href={`${path}/field`}>In its field</Link>
            </span>
          ) : null
        }
      >
        <OwnEntries design={design} />
      </Section>
      <Section id="revisions" title="Revisions">
        <ul className="list-[square] space-y-1 pl-5">
          {design.revisions.map((revision) => (
            <li key={revision.letter}>
              {revision.letter}: {formatFrame(revision.frameKey)}, {revision.material}, {rotorWords(revision)},{" "}
              {revision.licence}
              {revision.sentInAt === null ? ", not sent in yet" : ""}{" "}
              <Link href={`/my/designs/${slug}/revisions/${revision.letter}`}>Files and traits</Link>
            </li>
          ))}
        </ul>
      </Section>
      {last && choices.seasons.length > 0 ? (
        <Section id="send-in" title="Send in">
          <SendInForm slug={slug} letter={last.letter} seasons={choices.seasons} />
        </Section>
      ) : null}
      {latestIsOut ? (
        <Section id="revision" title="The next revision" note="What you declare is shown as declared.">
          <RevisionForm key={last?.letter} slug={slug} letter={nextLetter(last?.letter)} frames={choices.frames} />
        </Section>
      ) : null}
    </>
  );
}
