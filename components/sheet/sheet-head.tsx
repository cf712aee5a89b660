import Link from "next/link";
import type { Sheet } from "@/lib/contracts/sheet";
import { traitOf } from "@/lib/domain/designs/traits";
import { formatDate, machineTime } from "@/lib/format/dates";
import { formatFrame } from "@/lib/format/frames";
import { formatNumber } from "@/lib/format/numbers";
import { listWords } from "@/lib/format/words";
import { Facts, type Fact } from "@/components/ui/facts";
import { Missing } from "@/components/ui/missing";
import { Section } from "@/components/ui/sheet";
import { ClipButton } from "./clip-button";
import { correctedWords, licenceWords, millimetres, printTimeWords, sheetNumber, stageWords } from "./sheet-words";

/** A trait's key as people call it; a key that no trait has stands as it is. */
const traitWords = (key: string): string => {
  const label = traitOf(key)?.label ?? key.replaceAll("_", " ");
  return label.charAt(0).toLowerCase() + label.slice(1);
};

function traitFacts({ traits, revision }: Sheet): Fact[] {
  const { rotors } = traits;
  const unknown = <Missing why="not read off the mesh and not declared" />;
  const each = (of: (rotor: (typeof rotors)[number]) => number | null, decimals: number, unit: string) => {
    const known = rotors.map(of);
    return known.some((value) => value === null) || known.length === 0
      ? unknown
      : `${known.map((value) => formatNumber(value ?? Number.NaN, { decimals })).join(" + ")}${unit}`;
  };
  return [
    { label: "Stages", value: stageWords(traits) },
    { label: "Blades", value: each((rotor) => rotor.blades, 0, "") },
    {
      label: "Inlet stack",
      value: traits.inletStack === "none" ? "none" : `${traits.inletStack}, ${millimetres(traits.inletStackMm)}`,
    },
    ...(traits.stages > 1 ? [{ label: "Spacer", value: millimetres(traits.spacerMm) }] : []),
    { label: "Tip gap", value: traits.tipGapMm === null ? unknown : millimetres(traits.tipGapMm, 1) },
    { label: "Tip diameter", value: each((rotor) => rotor.tipDiameterMm, 1, " mm") },
    { label: "Pitch, mid-span", value: each((rotor) => rotor.pitchMidDeg, 1, "°") },
    { label: "Solidity", value: each((rotor) => rotor.solidityMid, 2, "") },
    { label: "Mass", value: each((rotor) => rotor.massG, 1, " g") },
    { label: "Struts", value: String(traits.struts) },
    { label: "Frame", value: formatFrame(traits.frameKey) },
    { label: "Material", value: traits.material },
    { label: "Print time", value: traits.printTimeMin === null ? unknown : printTimeWords(traits.printTimeMin) },
    { label: "Licence", value: licenceWords(revision.licence) },
  ];
}

/** Number, revision, season and round; who made it; the traits, each with where it comes from. */
export function SheetHead({ sheet }: { sheet: Sheet }) {
  const corrected = correctedWords(sheet.corrected);
  const roundHref = `/seasons/${sheet.season.slug}/rounds/${sheet.round}`;
  return (
    <Section id="sheet" className="grid gap-3">
      <div className="docket flex flex-wrap justify-between gap-x-6 gap-y-1">
        <p>
          {sheetNumber(sheet.number)} · revision {sheet.letter} ·{" "}
          <Link href={roundHref}>
            {sheet.season.title}, round {sheet.round}
          </Link>
        </p>
        <p>
          Published <time dateTime={machineTime(sheet.publishedAt)}>{formatDate(sheet.publishedAt)}</time> ·{" "}
          <Link href="/method">method {sheet.methodVersion}</Link>
          {corrected ? (
            <>
              {" · "}
              <a href="#questions" className="text-ribbon">
                {corrected}
              </a>
            </>
          ) : (
            " · no corrections"
          )}
        </p>
      </div>
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
        <div>
          <h1 id="sheet-title">{sheet.name}</h1>
          <p>by {listWords(sheet.designers.length > 0 ? sheet.designers : ["a former member"])}</p>
          {sheet.summary ? <p className="text-soft">{sheet.summary}</p> : null}
        </div>
        <ClipButton id={sheet.entryId} name={`${sheet.name} ${sheet.letter}`} />
      </div>
      <Facts flow="strip" facts={traitFacts(sheet)} />
      <p className="small-print">
        {sheet.traits.readFromMesh.length === 0
          ? "Traits are as declared; none was read off a mesh."
          : `Read off the mesh: ${listWords(sheet.traits.readFromMesh.map(traitWords))}. The rest is as declared.`}
      </p>
    </Section>
  );
}
