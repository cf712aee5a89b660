"use client";

import clsx from "clsx";
import { useId, useRef, useState, type DragEvent } from "react";
import { Button } from "@/components/ui/button";

export type DropModelProps = {
  onFile: (file: File) => void;
  /** The reader is loaded. */
  ready: boolean;
  /** A model is there already. */
  again: boolean;
};

/** Where a model is dropped or chosen. STEP may be chosen too, to be told that it isn't measured. */
export function DropModel({ onFile, ready, again }: DropModelProps) {
  const input = useRef<HTMLInputElement>(null);
  const [over, setOver] = useState(false);
  const noteId = useId();
  const drop = (event: DragEvent) => {
    event.preventDefault();
    setOver(false);
    const file = event.dataTransfer.files[0];
    if (file) onFile(file);
  };
  return (
    <div
      aria-busy={!ready}
      className={clsx(
        "grid max-w-3xl justify-items-start gap-3 border-2 border-dashed p-5",
        over ? "border-ink bg-bar" : "border-rule",
      )}
      onDragOver={(event) => {
        event.preventDefault();
        setOver(true);
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
    >
      <p>
        <strong>Drop an STL or 3MF file here</strong>, or choose one.
      </p>
      <Button kind={again ? "outline" : "solid"} aria-describedby={noteId} onClick={() => input.current?.click()}>
        {again ? "Choose another model" : "Choose a model"}
      </Button>
      <input
        ref={input}
        type="file"
        accept=".stl,.3mf,.step,.stp"
        aria-label="Model file"
        tabIndex={-1}
        className="sr-only"
        onChange={(event) => {
          const file = event.target.files?.[0];
          if (file) onFile(file);
          event.target.value = "";
        }}
      />
      <p id={noteId} className="small-print">
        It is read here, in your browser: nothing is sent. Up to 268 MB and 4 million triangles. A STEP file is kept and
        offered for download when it is sent in, but not measured.
      </p>
    </div>
  );
}
