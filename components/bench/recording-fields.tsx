"use client";

import { Field, Select } from "@/components/ui/field";
import { NumberField } from "@/components/ui/number-field";
import { Slot } from "@/components/ui/slot";
import { Notice } from "@/components/ui/notice";
import type { BenchRecordings } from "@/lib/contracts/bench-recordings";
import { formatTime } from "@/lib/format/dates";
import { keptOf, type RecordingPlace, type useRecordingForm } from "./use-recording-form";

type Form = ReturnType<typeof useRecordingForm>;

/** Where and how a recording is read: position, channel, what tells its level, its background, the rotors. */
export function RecordingFields({ form, place, known }: { form: Form; place: RecordingPlace; known: BenchRecordings }) {
  const { choice, change, positions, wrong } = form;
  return (
    <div className="grid gap-3 sm:grid-cols-2 lg:grid-cols-3">
      {positions.length > 1 ? (
        <Select
          label="Microphone position"
          value={choice.positionId}
          onChange={(event) => change({ positionId: event.currentTarget.value })}
          options={positions.map((each) => ({ value: each.id, label: `${each.name}, ${each.distanceMm} mm` }))}
        />
      ) : null}
      <Select
        label="Channel"
        value={choice.channel}
        onChange={(event) => change({ channel: event.currentTarget.value })}
        options={[
          { value: "", label: "the first" },
          ...Array.from({ length: 8 }, (_, i) => ({ value: String(i + 1), label: String(i + 1) })),
        ]}
      />
      <LevelFields form={form} place={place} />
      {place.purpose === "background" ? (
        <div className="grid gap-2 sm:col-span-2 lg:col-span-3">
          <Slot
            label="Heater on, because its supply hums"
            checked={choice.heated}
            onChange={(event) => change({ heated: event.currentTarget.checked })}
          />
          {choice.heated ? (
            <Notice kind="caution" title="heater on with the fan stopped: 30 s at most">
              <p>Nothing carries the heat away: have the thermal cut-out tried, and stay beside it.</p>
            </Notice>
          ) : null}
        </div>
      ) : null}
      {place.purpose === "run" ? (
        <>
          <Select
            label="Background"
            value={choice.backgroundId}
            onChange={(event) => change({ backgroundId: event.currentTarget.value })}
            options={[
              ...keptOf(known.items, "background", choice.positionId).map((each) => ({
                value: each.id,
                label: `${each.name}, ${formatTime(each.createdAt)}`,
              })),
              { value: "", label: "none recorded" },
            ]}
          />
          <RotorFields form={form} />
        </>
      ) : null}
      {wrong.calibratorDb ? <p className="field-error">{wrong.calibratorDb}</p> : null}
    </div>
  );
}

function LevelFields({ form, place }: { form: Form; place: RecordingPlace }) {
  const { choice, change, calibrators, wrong } = form;
  const alone = place.purpose === "calibration" && place.phase === "before";
  return (
    <>
      {place.purpose === "calibration" ? (
        <NumberField
          label="The calibrator gives"
          unit="dB"
          defaultValue={choice.calibratorDb}
          onValue={(calibratorDb) => change({ calibratorDb })}
        />
      ) : null}
      {alone ? null : (
        <>
          <Select
            label="Level is told by"
            value={choice.calibration}
            onChange={(event) => change({ calibration: event.currentTarget.value })}
            options={[
              ...calibrators.map((each) => ({
                value: each.id,
                label: `calibrator ${each.phase}, ${each.name}, ${formatTime(each.createdAt)}`,
              })),
              { value: "full-scale", label: "a full-scale level" },
            ]}
          />
          {choice.calibration === "full-scale" ? (
            <NumberField
              label="Level at an rms of 1"
              unit="dB"
              hint="re full scale; no recorder gives it by itself"
              defaultValue={choice.fullScaleDb}
              onValue={(fullScaleDb) => change({ fullScaleDb })}
              error={wrong.fullScale}
            />
          ) : null}
        </>
      )}
    </>
  );
}

function RotorFields({ form }: { form: Form }) {
  const { choice, change, wrong } = form;
  const { rotors } = choice;
  const type = (changed: Partial<typeof rotors>) => change({ rotors: { ...rotors, ...changed } });
  const two = /\d[\s,;]+\d/.test(rotors.blades);
  return (
    <>
      <Field
        figures
        label="Blades"
        hint="rotor 1 first: 11, 7; empty for no prediction"
        value={rotors.blades}
        onChange={(event) => type({ blades: event.currentTarget.value })}
        error={wrong.blades}
      />
      <Field
        figures
        label="Speeds by tachometer"
        unit="rpm"
        hint="one a rotor"
        value={rotors.rpm}
        onChange={(event) => type({ rpm: event.currentTarget.value })}
        error={wrong.rpm}
      />
      {two ? (
        <Select
          label="Second rotor turns"
          value={rotors.rotation}
          onChange={(event) => type({ rotation: event.currentTarget.value === "co" ? "co" : "counter" })}
          options={[
            { value: "counter", label: "counter-rotating" },
            { value: "co", label: "the same way" },
          ]}
        />
      ) : null}
      <Field
        figures
        label="Struts"
        hint="0 or empty for none"
        value={rotors.struts}
        onChange={(event) => type({ struts: event.currentTarget.value })}
        error={wrong.struts}
      />
    </>
  );
}
