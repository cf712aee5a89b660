"use client";

import { useClips } from "@/components/shell/clips";
import { Button } from "@/components/ui/button";

/** Clips this revision to the sheet's lower edge for a comparison, or takes it off again. */
export function ClipButton({ id, name }: { id: string; name: string }) {
  const { isClipped, isFull, toggle } = useClips();
  const clipped = isClipped(id);
  return (
    <Button
      kind={clipped ? "outline" : "solid"}
      aria-pressed={clipped}
      disabled={!clipped && isFull}
      onClick={() => toggle({ id, name })}
    >
      {clipped ? "Clipped for a comparison" : "Clip for a comparison"}
    </Button>
  );
}
