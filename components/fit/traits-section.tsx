import type { BarsRow } from "@/components/ui/bars/bars-model";
import { BarsTable } from "@/components/ui/bars/bars-table";
import { FigureBlock } from "@/components/ui/figure-block";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";
import type { ModelMeasured, RotorTraits } from "@/lib/client/fit/messages";
import { formatNumber, minusSign } from "@/lib/format/numbers";
import { countWords } from "@/lib/format/words";

const mm = (value: number, decimals = 1) => formatNumber(value, { decimals });

const handWords = {
  right: "right: turns anticlockwise as it rises",
  left: "left: turns clockwise as it rises",
} as const;

const figure = (value: number, decimals = 1) => ({ figure: { value, decimals } });

function stationRows(rotors: readonly RotorTraits[]): BarsRow[] {
  return rotors.flatMap((rotor, index) =>
    rotor.stations.map((station) => ({
      key: `${index}-${station.spanFraction}`,
      cells: {
        place: {
          words: `${rotors.length > 1 ? `Rotor ${index + 1}, ` : ""}${Math.round(100 * station.spanFraction)} % span`,
        },
        radius: figure(station.radiusMm),
        pitch: figure(station.pitchDeg),
        chord: figure(station.chordMm),
        solidity: figure(station.solidity, 2),
      },
    })),
  );
}

function rotorRows(rotors: readonly RotorTraits[]): BarsRow[] {
  return rotors.map((rotor, index) => ({
    key: String(index),
    cells: {
      rotor: { words: `Rotor ${index + 1}` },
      blades: figure(rotor.blades, 0),
      hand: { words: rotor.hand },
      tip: figure(rotor.tipDiameterMm),
      swept: figure(rotor.sweptDiameterMm),
      hub: figure(rotor.hubDiameterMm),
      depth: figure(rotor.axialDepthMm),
      ring: { words: rotor.shroud ? "yes" : "no" },
      sure: figure(100 * rotor.confidence, 0),
    },
  }));
}

const sureWords = (confidence: number | null): string => `${Math.round(100 * (confidence ?? 0))} % sure`;

/** Struts, inlet stack and spacer, where they are in the file. */
function StandingParts({ measured: { struts, strutsConfidence, inletStack, spacer } }: { measured: ModelMeasured }) {
  if (struts === null && !inletStack && !spacer) {
    return <p className="small-print max-w-3xl">Nothing that stands still is in the file.</p>;
  }
  return (
    <FigureBlock
      figures={[
        ...(struts === null ? [] : [{ label: "Struts", value: String(struts), note: sureWords(strutsConfidence) }]),
        ...(inletStack
          ? [
              {
                label: "Inlet stack",
                value: mm(inletStack.lengthMm),
                note: `mm, ${inletStack.kind}, ${sureWords(inletStack.confidence)}`,
              },
            ]
          : []),
        ...(spacer
          ? [{ label: "Spacer", value: mm(spacer.lengthMm), note: `mm, ${sureWords(spacer.confidence)}` }]
          : []),
      ]}
    />
  );
}

/** What was read off the mesh, each rotor with how sure it is. */
export function TraitsSection({ measured }: { measured: ModelMeasured }) {
  const { rotors, spacingsMm } = measured;
  const [first] = rotors;
  if (!first) {
    return (
      <Section id="traits" title="Traits">
        <EmptyState title="No rotor was found">
          <p>No axis shows a hub with two or more like blades around it. The mesh is told about below all the same.</p>
        </EmptyState>
      </Section>
    );
  }
  const each = (of: (rotor: RotorTraits) => string) => {
    const values = rotors.map(of);
    // Said once where all are alike, but for the blades, which are added up in one's head.
    return values.every((value) => value === values[0]) ? values[0] : values.join(" + ");
  };
  return (
    <Section id="traits" title="Traits" note="as read off the mesh" className="grid gap-5">
      <FigureBlock
        figures={[
          {
            label: "Blades",
            value: rotors.map((rotor) => rotor.blades).join(" + "),
            note: countWords(rotors.length, "rotor"),
          },
          {
            label: "Hand",
            value: each((rotor) => rotor.hand),
            note: rotors.length === 1 ? handWords[first.hand] : null,
          },
          { label: "Tip diameter", value: each((rotor) => mm(rotor.tipDiameterMm)), note: "mm" },
          { label: "Hub diameter", value: each((rotor) => mm(rotor.hubDiameterMm)), note: "mm" },
        ]}
      />
      <BarsTable
        caption="Rotors in order along the axis"
        columns={[
          { key: "rotor", head: "Rotor" },
          { key: "blades", head: "Blades" },
          { key: "hand", head: "Hand" },
          { key: "tip", head: "Tip Ø", unit: "mm" },
          { key: "swept", head: "Swept Ø", unit: "mm" },
          { key: "hub", head: "Hub Ø", unit: "mm" },
          { key: "depth", head: "Depth", unit: "mm" },
          { key: "ring", head: "Ring" },
          { key: "sure", head: "Sure", unit: "%" },
        ]}
        rows={rotorRows(rotors)}
      />
      <BarsTable
        caption="Blades along their span"
        columns={[
          { key: "place", head: "Place" },
          { key: "radius", head: "Radius", unit: "mm" },
          { key: "pitch", head: "Pitch", unit: "°" },
          { key: "chord", head: "Chord", unit: "mm" },
          { key: "solidity", head: "Solidity" },
        ]}
        rows={stationRows(rotors)}
      />
      <p className="small-print max-w-3xl">
        Pitch is from the plane of rotation. “Sure” is the share of cylinders through the blades that agree on their
        number. {spacingsMm.map((gap) => (gap < 0 ? `${minusSign}${mm(-gap)}` : mm(gap))).join(" and ")}
        {spacingsMm.length > 0 ? " mm between the rotors along the axis. " : ""}
      </p>
      <StandingParts measured={measured} />
    </Section>
  );
}
