"use client";

import { useEffect, useState } from "react";
import { Button } from "@/components/ui/button";
import { Progress } from "@/components/ui/progress";
import { Section } from "@/components/ui/sheet";
import { ErrorState } from "@/components/ui/states";
import { chosenFrame } from "@/lib/client/fit/chosen-frame";
import { forgetKeptModel, keptModel } from "@/lib/client/fit/kept-model";
import type { CarryChoices } from "@/lib/contracts/carry";
import type { FitLimits } from "@/lib/contracts/fit-limits";
import { useModelReading, type ModelReadingActs } from "@/lib/client/fit/use-model-reading";
import { formatCount } from "@/lib/format/numbers";
import { CarryOn } from "./carry-on";
import { CompareFields, type CompareWith } from "./compare-fields";
import { DropModel } from "./drop-model";
import { FitResults } from "./fit-results";
import { UnitQuestion } from "./unit-question";

const PLA_GCM3 = 1.24;
const BENCH_RPM = 2000;

function Reading({ state, measureIn, cancel }: ModelReadingActs) {
  if (state.step === "reading") {
    const { read, expected } = state;
    const words = expected
      ? `${formatCount(read)} of ${formatCount(expected)} triangles read`
      : `${formatCount(read)} triangles read`;
    return <Progress label={state.name} done={read} of={expected} words={words} onCancel={cancel} />;
  }
  if (state.step === "unit") return <UnitQuestion model={state.model} onUnit={measureIn} />;
  if (state.step === "measuring") {
    const words = `measuring ${formatCount(state.model.triangles)} triangles`;
    return <Progress label={state.model.name} done={0} words={words} onCancel={cancel} />;
  }
  if (state.step === "refused") {
    return (
      <ErrorState title={state.name ? `${state.name} can’t be used` : "The file can’t be used"}>
        <p>{state.message}</p>
        <p>Export it again as a binary STL or 3MF in millimetres, and choose it here.</p>
      </ErrorState>
    );
  }
  if (state.step === "measured") {
    return (
      <p role="status" className="flex flex-wrap items-baseline gap-3">
        <span>
          <strong>{state.model.name}</strong>: {formatCount(state.model.triangles)} triangles read and measured.
        </span>
        <Button small kind="quiet" onClick={cancel}>
          Put it away
        </Button>
      </p>
    );
  }
  return null;
}

/** A model is dropped, read beside the page, and compared with a frame, a season and a bench. */
export function FitDesk({ limits, own }: { limits: FitLimits; own: CarryChoices | null }) {
  const reading = useModelReading();
  const { state, ready, choose, compare } = reading;
  const [file, setFile] = useState<File>();
  const [carrying, setCarrying] = useState(false);
  const [chosen, setChosen] = useState<CompareWith>({
    ownFrame: {},
    frameKey: limits.seasons[0]?.frameKeys[0] ?? limits.frames[0]?.key ?? "",
    seasonSlug: limits.seasons[0]?.slug ?? "",
    speedRpm: BENCH_RPM,
    densityGCm3: PLA_GCM3,
    turned: false,
  });
  const measured = state.step === "measured" ? state.measured : undefined;
  const { frameKey, ownFrame, seasonSlug, turned } = chosen;
  useEffect(() => {
    const preset = limits.frames.find((each) => each.key === frameKey);
    const season = limits.seasons.find((each) => each.slug === seasonSlug);
    if (measured && preset) compare({ frame: chosenFrame(preset, ownFrame), season, turned });
  }, [measured, limits, frameKey, ownFrame, seasonSlug, turned, compare]);
  useEffect(() => {
    keptModel()
      .then((kept) => {
        if (!kept) return;
        setFile(kept.file);
        setCarrying(true);
        choose(kept.file, kept.mmPerUnit);
      })
      // A browser that keeps nothing kept nothing.
      .catch(() => undefined);
  }, [choose]);
  const chooseFile = (given: File) => {
    setFile(given);
    setCarrying(false);
    void forgetKeptModel();
    choose(given);
  };
  const putAway = () => {
    setFile(undefined);
    void forgetKeptModel();
    reading.cancel();
  };
  return (
    <>
      <Section
        id="fit"
        level={1}
        title="Fit a model"
        note="traits, frame, balance and drawing, off your mesh"
        className="grid gap-5"
      >
        <DropModel onFile={chooseFile} ready={ready} again={state.step !== "none"} />
        <Reading {...reading} cancel={putAway} />
        {state.step === "measured" && file ? (
          <CarryOn
            model={{ file, mmPerUnit: state.mmPerUnit }}
            rotors={state.measured.rotors}
            frameKey={frameKey}
            choices={own}
            open={carrying}
            onOpen={setCarrying}
          />
        ) : null}
        <CompareFields
          limits={limits}
          chosen={chosen}
          onChange={(part) => setChosen((before) => ({ ...before, ...part }))}
        />
      </Section>
      {state.step === "measured" ? (
        <FitResults state={state} limits={limits} chosen={chosen} turn={reading.turn} />
      ) : null}
    </>
  );
}
