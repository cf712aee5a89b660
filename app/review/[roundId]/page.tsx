import type { Metadata } from "next";
import { FiguresTable } from "@/components/review/figures-table";
import { RoundRecord } from "@/components/review/round-record";
import { SendBackForm } from "@/components/review/send-back-form";
import { SignForm } from "@/components/review/sign-form";
import { Facts } from "@/components/ui/facts";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import { orPageState, personForPage } from "@/lib/auth/page";
import { idOrNotFound } from "@/lib/auth/page-id";
import { levelUnit } from "@/lib/format/quantities";
import { readRoundForReview } from "@/lib/server/review/read-round";

export const metadata: Metadata = { title: "Review of a round" };

export default async function ReviewRoundPage({ params }: { params: Promise<{ roundId: string }> }) {
  const roundId = idOrNotFound((await params).roundId);
  const path = `/review/${roundId}`;
  const actor = await personForPage(path);
  const round = await orPageState(readRoundForReview(actor, { roundId }), path);
  const inReview = round.entries.filter((entry) => entry.state === "in_review");
  const distanceMm = round.entries.find((entry) => entry.snapshot)?.snapshot?.microphoneDistanceMm;
  const levelsUnit = distanceMm === undefined ? "dB(A) at the bench’s microphone" : levelUnit(distanceMm);
  return (
    <>
      <Section
        id="round"
        level={1}
        title={`Review of season ${round.seasonNumber}, round ${round.number}`}
        note="Nothing here is published. Figures are as publishing would freeze them."
      >
        <Facts
          flow="strip"
          facts={[
            { label: "State", value: round.state.replaceAll("_", " ") },
            { label: "Entries", value: round.entries.length },
            { label: "Levels", value: `${round.levelsDba.join(", ")} ${levelsUnit}` },
            { label: "Simulated rounds", value: round.standings[0]?.draws ?? "none" },
          ]}
        />
        <p className="docket mt-2 break-all">What is signed, SHA-256: {round.sha256}</p>
        <p className="small-print mt-2">
          Each entry opens to its raw readings. ± is half of the 95 % interval; one printed copy is measured, so that
          copy-to-copy spread is not included. Ranks are from few draws here, the published standing takes more.
        </p>
      </Section>
      <Section id="figures" title="Figures">
        <FiguresTable round={round} />
      </Section>
      <Section id="record" title="Record">
        <RoundRecord round={round} />
      </Section>
      <Section id="sign" title="Sign the round" tone="bar">
        {round.whyNotSign.length > 0 ? (
          <Notice title="You can't sign it now">
            <ul className="list-[square] pl-5">
              {round.whyNotSign.map((why) => (
                <li key={why}>{why}</li>
              ))}
            </ul>
          </Notice>
        ) : (
          <SignForm roundId={roundId} sha256={round.sha256} />
        )}
      </Section>
      {round.state === "in_review" && round.mayReview ? (
        <Section id="send-back" title="Send back">
          <SendBackForm
            roundId={roundId}
            entries={inReview.map(({ entryId, designName, letter }) => ({ entryId, name: `${designName} ${letter}` }))}
          />
        </Section>
      ) : null}
    </>
  );
}
