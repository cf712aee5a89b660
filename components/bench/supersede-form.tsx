"use client";

import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Field } from "@/components/ui/field";
import { NumberField } from "@/components/ui/number-field";
import { useSupersede } from "@/lib/client/bench";
import type { BenchReadingView } from "@/lib/contracts/bench-session";
import { Refusal } from "./refusal";

/** Brings another value in a reading's place, with a reason; the old one stays beside it. */
export function SupersedeForm({ reading, name }: { reading: BenchReadingView; name: string }) {
  const [open, setOpen] = useState(false);
  const [value, setValue] = useState<number>();
  const [reason, setReason] = useState("");
  const supersede = useSupersede(reading.id);
  if (!open) {
    return (
      <Button
        kind="quiet"
        small
        aria-label={`Supersede ${name}, ${reading.value} ${reading.unit}`}
        onClick={() => setOpen(true)}
      >
        Supersede
      </Button>
    );
  }
  return (
    <form
      className="flex w-full flex-wrap items-end gap-3 py-2"
      onSubmit={(event) => {
        event.preventDefault();
        if (value === undefined || supersede.isPending) return;
        supersede.mutate({ value, reason }, { onSuccess: () => setOpen(false) });
      }}
    >
      <NumberField
        className="w-40"
        label={`${name} instead`}
        unit={reading.unit}
        onValue={setValue}
        error={supersede.error?.field("value")}
      />
      <Field
        className="w-64"
        label="Reason to supersede"
        required
        value={reason}
        onChange={(event) => setReason(event.currentTarget.value)}
        error={supersede.error?.field("reason")}
      />
      <Button type="submit" busy={supersede.isPending} disabled={value === undefined || reason.trim() === ""}>
        Supersede reading
      </Button>
      <Button kind="quiet" onClick={() => setOpen(false)}>
        Leave as it is
      </Button>
      <Refusal error={supersede.error} fields={false} />
    </form>
  );
}
