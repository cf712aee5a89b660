import Link from "next/link";
import { CautionList } from "@/components/ui/notice";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import type { Kit } from "@/lib/contracts/kit";
import { formatFrame } from "@/lib/format/frames";
import { formatNumber } from "@/lib/format/numbers";

const mm = (value: number) => `${formatNumber(value, { decimals: Number.isInteger(value) ? 0 : 1 })} mm`;

function checks(kit: Kit): string[] {
  const { frames, totalDepthMaxMm, inletStackMaxMm, solids } = kit;
  const swept = frames.map(
    (frame) => `${mm(frame.boreMm - 2 * frame.toleranceMm)} in a frame of ${formatFrame(frame.key)}`,
  );
  return [
    `What turns is at most ${[...new Set(swept)].join(", ")} across, ring and all.`,
    ...(totalDepthMaxMm === null
      ? []
      : [`All of it together is at most ${mm(totalDepthMaxMm)} deep from the mounting face.`]),
    ...(inletStackMaxMm === null
      ? []
      : [`What stands before the frame on the inlet side is at most ${mm(inletStackMaxMm)} long.`]),
    ...(solids.length > 0 ? ["Neither the model nor what it sweeps meets a keep-out solid."] : []),
    "The mesh is closed, its shells face outwards, and it is in millimetres.",
    "The bore of the hub fits the bench’s drive; no part of a blade is thinner than two lines of your nozzle.",
    "It balances as drawn: the fit page tells what is off, and where.",
    "Licence, material and print notes are what you would want another to print it by.",
  ];
}

const cautions = [
  "A printed rotor can burst or shed a blade. Try yours behind a guard, with eye protection, out of its plane, in steps, and stop on any vibration.",
  "Fitting the frame says nothing of strength: a hub can slip, a layer can split, a tip can rub once it is warm.",
  "A cooler under load burns skin, and a stopped fan lets a heater overheat: fit an independent thermal cut-out.",
];

/** What to check, how to send in, and what can hurt on the way. */
export function KitGuide({ kit, open }: { kit: Kit; open: boolean }) {
  return (
    <>
      <Section id="checklist" title="Before you send it in" className="grid gap-4">
        <ul className="max-w-3xl list-[square] space-y-1 pl-5">
          {checks(kit).map((line) => (
            <li key={line}>{line}</li>
          ))}
        </ul>
        <CautionList title="before you print and try it" items={cautions} />
      </Section>
      <Section id="send-in" title="How to send in" className="grid gap-4">
        <ol className="max-w-3xl list-decimal space-y-1 pl-6">
          <li>
            Drop the model on <Link href="/fit">the fit page</Link>: it is read in your browser against this season’s
            frames and solids.
          </li>
          <li>Carry it on into a draft of a design of yours. The server reads it once more.</li>
          <li>Confirm each trait on the draft’s page: as read, or as you declare it.</li>
          <li>
            Send the revision in to {kit.season.title} from its design’s page. From then on its files don’t change.
          </li>
        </ol>
        {open ? (
          <p className="flex flex-wrap gap-3">
            <LinkButton kind="solid" href="/fit">
              Fit a model
            </LinkButton>
            <LinkButton href="/my/designs">My designs</LinkButton>
          </p>
        ) : (
          <p>This season takes no more entries; its kit stays here for those who check its figures.</p>
        )}
      </Section>
    </>
  );
}
