import { BarsTable } from "@/components/ui/bars/bars-table";
import { Section } from "@/components/ui/sheet";
import type { Sheet } from "@/lib/contracts/sheet";
import { levelUnit } from "@/lib/format/quantities";
import { millimetres, stackReadsHigh } from "./sheet-words";

/** Said where the inlet stack takes a fifth of the microphone's distance or more; absent otherwise. */
export function OffAxis({ sheet }: { sheet: Sheet }) {
  if (!stackReadsHigh(sheet)) return null;
  const distance = sheet.bench.microphoneDistanceMm;
  const stack = sheet.traits.inletStackMm;
  const names = [...new Set(sheet.points.flatMap((point) => point.otherPositions.map(({ name }) => name)))];
  const unit = levelUnit(distance);
  return (
    <Section id="off-axis" title="The inlet stack is close to the microphone">
      <p>
        The stack of {millimetres(stack)} takes a fifth or more of the {millimetres(distance)} from the mounting flange
        to the microphone: its foremost part stands {millimetres(distance - stack)} away. The level on axis may read
        high for that (house rule, no source). Nothing is corrected for it
        {names.length > 0
          ? "; the reading off the axis stands beside it."
          : ", and this bench version had no second position."}
      </p>
      {names.length > 0 ? (
        <div className="mt-3 max-w-2xl">
          <BarsTable
            caption="Levels on axis and off it by set speed"
            columns={[
              { key: "set", head: "Set speed", unit: sheet.protocol.setting === "rpm" ? "rpm" : "% drive" },
              { key: "on", head: "On axis", unit },
              ...names.map((name) => ({ key: name, head: name, unit })),
            ]}
            rows={sheet.points.map((point) => ({
              key: String(point.setSpeed),
              cells: {
                set: { figure: { value: point.setSpeed, decimals: 0 } },
                on: {
                  figure: { value: point.levelDba.value, decimals: 1, bound: point.upperBound ? "upper" : undefined },
                },
                ...Object.fromEntries(
                  names.map((name) => [
                    name,
                    {
                      figure: { value: point.otherPositions.find((each) => each.name === name)?.levelDba, decimals: 1 },
                    },
                  ]),
                ),
              },
            }))}
          />
        </div>
      ) : null}
    </Section>
  );
}
