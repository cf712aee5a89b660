import { BarsTable } from "@/components/ui/bars/bars-table";
import { Section } from "@/components/ui/sheet";
import type { BenchSession } from "@/lib/contracts/bench-session";
import type { QualificationView, UnitBridgeView } from "@/lib/contracts/control";
import { speedWords } from "./words";

/** What a qualification or a bridging session gives; nothing for a round's session. */
export function PurposeSection({ session }: { session: BenchSession }) {
  if (session.qualification) return <Qualification session={session} outcome={session.qualification} />;
  return session.bridge ? <Bridge session={session} bridge={session.bridge} /> : null;
}

const once = "no mount was run twice at this speed";
const oneMount = "fewer than two mounts";

function Qualification({ session, outcome }: { session: BenchSession; outcome: QualificationView }) {
  const { points, lacks, settled } = outcome;
  const { setting } = session.protocol;
  return (
    <Section id="qualification" title="Repeatability and agreed values" tone="bar">
      <p role="status" className="mb-3">
        {settled
          ? "The agreed values are written down: the bench is qualified at these set speeds."
          : lacks.length > 0
            ? `Still lacking: ${lacks.map((each) => `${each} ${setting === "rpm" ? "rpm" : "%"}`).join(", ")}.`
            : session.endedAt === null
              ? `All ${outcome.mounts} mounts are there. The agreed values are written down when the session ends with nothing to hold it.`
              : "The session is held: the agreed values are written down once its holds are lifted."}
      </p>
      {points.length === 0 ? <p>No run of the baseline is done yet.</p> : null}
      {points.length > 0 ? (
        <BarsTable
          caption="Repeatability of the baseline by set speed, and the values that would be agreed"
          columns={[
            { key: "speed", head: "Set speed" },
            { key: "mounts", head: "Mounts" },
            { key: "level", head: "Level", unit: "dB(A)", tone: "baseline" },
            { key: "uLevel", head: "u", unit: "dB", label: "Standard uncertainty of the level" },
            { key: "sLevel", head: "Between mounts", unit: "dB" },
            { key: "wLevel", head: "Within a mount", unit: "dB" },
            { key: "resistance", head: "ΔT/P", unit: "K/W", tone: "baseline" },
            { key: "uResistance", head: "u", unit: "K/W", label: "Standard uncertainty of ΔT/P" },
            { key: "sResistance", head: "Between mounts", unit: "K/W" },
            { key: "wResistance", head: "Within a mount", unit: "K/W" },
          ]}
          rows={points.map(({ setSpeed, mounts, levelIsBound, levelDba, resistanceKpw }) => ({
            key: String(setSpeed),
            cells: {
              speed: { words: speedWords(setSpeed, setting) },
              mounts: { figure: { value: mounts, decimals: 0 } },
              level: { figure: { value: levelDba.value, decimals: 2, bound: levelIsBound ? "upper" : undefined } },
              uLevel: { figure: { value: levelDba.u, decimals: 2 } },
              sLevel: { figure: { value: levelDba.sBetween, decimals: 2, why: oneMount } },
              wLevel: { figure: { value: levelDba.sWithin, decimals: 2, why: once } },
              resistance: { figure: { value: resistanceKpw.value, decimals: 4 } },
              uResistance: { figure: { value: resistanceKpw.u, decimals: 4 } },
              sResistance: { figure: { value: resistanceKpw.sBetween, decimals: 4, why: oneMount } },
              wResistance: { figure: { value: resistanceKpw.sWithin, decimals: 4, why: once } },
            },
          }))}
        />
      ) : null}
    </Section>
  );
}

function Bridge({ session, bridge }: { session: BenchSession; bridge: readonly UnitBridgeView[] }) {
  const [from, to] = session.subjects;
  return (
    <Section id="bridge" title="The bridge" tone="bar" note={`${from?.name} ÷ ${to?.name}`}>
      {bridge.length === 0 ? (
        <p>Both units need runs that are done, at two speeds or more, before anything can be said.</p>
      ) : (
        <BarsTable
          caption="How one unit stands to the other"
          columns={[
            { key: "what", head: "Quantity" },
            { key: "at", head: "At" },
            { key: "value", head: "Ratio, or difference in dB", tone: "baseline" },
            { key: "u", head: "u", label: "Standard uncertainty" },
            { key: "dof", head: "ν", label: "Degrees of freedom" },
          ]}
          rows={bridge.map((each) => ({
            key: `${each.quantity} ${each.setSpeed} ${each.levelDba}`,
            cells: {
              what: { words: each.quantity === "level_dba" ? "Level difference" : "ΔT/P ratio" },
              at: {
                words:
                  each.setSpeed === null
                    ? `${each.levelDba} dB(A)`
                    : speedWords(each.setSpeed, session.protocol.setting),
              },
              value: {
                figure: {
                  value: each.ratio ?? each.difference,
                  decimals: each.ratio === null ? 2 : 4,
                  signed: each.ratio === null,
                },
              },
              u: { figure: { value: each.u, decimals: each.ratio === null ? 2 : 4 } },
              dof: { figure: { value: each.dof, decimals: 0, why: "infinitely many" } },
            },
          }))}
        />
      )}
      <p className="small-print mt-2">
        Written down when the session ends with nothing to hold it. Scores of sessions with the other unit go over the
        ratio at the level, with its uncertainty added.
      </p>
    </Section>
  );
}
