import type { FitLimits } from "@/lib/contracts/fit-limits";
import { chosenFrame, isOwnFrame } from "@/lib/client/fit/chosen-frame";
import type { ModelReadingActs, ModelState } from "@/lib/client/fit/use-model-reading";
import { BalanceSection } from "./balance-section";
import type { CompareWith } from "./compare-fields";
import { CrossingsSection } from "./crossings-section";
import { DrawingSection } from "./drawing-section";
import { FrameSection } from "./frame-section";
import { TraitsSection } from "./traits-section";
import { ValiditySection } from "./validity-section";

export type FitResultsProps = {
  state: Extract<ModelState, { step: "measured" }>;
  limits: FitLimits;
  chosen: CompareWith;
  turn: ModelReadingActs["turn"];
};

/** Everything read off a model, piece by piece. */
export function FitResults({ state, limits, chosen, turn }: FitResultsProps) {
  const { model, measured } = state;
  const preset = limits.frames.find((each) => each.key === chosen.frameKey);
  const season = limits.seasons.find((each) => each.slug === chosen.seasonSlug);
  const { rotors } = measured;
  const [first, second] = rotors;
  return (
    <>
      <TraitsSection measured={measured} />
      {preset ? (
        <FrameSection
          compared={state.compared}
          frame={chosenFrame(preset, chosen.ownFrame)}
          own={isOwnFrame(preset, chosen.ownFrame)}
          season={season}
        />
      ) : null}
      <DrawingSection name={model.name} drawn={state.drawn} turn={turn} />
      {first && second ? (
        <CrossingsSection
          key={`${first.blades}-${second.blades}-${first.hand}-${second.hand}`}
          first={first}
          second={second}
          speedRpm={chosen.speedRpm}
        />
      ) : null}
      <BalanceSection rotors={rotors} densityGCm3={chosen.densityGCm3} speedRpm={chosen.speedRpm} />
      <ValiditySection model={model} measured={measured} />
    </>
  );
}
