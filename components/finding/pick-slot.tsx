"use client";

import { useClips } from "@/components/shell/clips";
import { Slot } from "@/components/ui/slot";

/** A slot that clips an entry for a comparison. Where scripts don't run it is a checkbox of the form around the table. */
export function PickSlot({ token, name }: { token: string; name: string }) {
  const { isClipped, isFull, toggle } = useClips();
  const clipped = isClipped(token);
  return (
    <Slot
      hideLabel
      name="clip"
      value={token}
      label={`Clip ${name} for a comparison`}
      checked={clipped}
      disabled={isFull && !clipped}
      onChange={() => toggle({ id: token, name })}
    />
  );
}
