"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import type { ActField } from "@/components/ui/act/act-values";
import { Button } from "@/components/ui/button";
import { Dialog } from "@/components/ui/dialog";
import { Notice } from "@/components/ui/notice";
import { useAddKeepOutBox, useDropKeepOut } from "@/lib/client/host";
import { HostForm } from "./host-form";

const boxFields: readonly ActField[] = [
  { name: "name", label: "Name of the solid", hint: "What it is, as in “Memory, slot 1”." },
  { name: "note", label: "Note to the solid", optional: true },
  {
    name: "minMm",
    label: "Smallest x, y and z",
    kind: "numbers",
    unit: "mm",
    hint: "Three figures with blanks between, as in 62 -70 -45.",
  },
  { name: "maxMm", label: "Largest x, y and z", kind: "numbers", unit: "mm", hint: "As in 70 70 8." },
];

/** Adds a box by its two corners. */
export function AddKeepOutBoxForm({ benchVersionId }: { benchVersionId: string }) {
  return (
    <HostForm
      label="Add a box"
      words="Add the box"
      busyWords="Adding …"
      doneWords="Added: models are compared with it once a season opens on this bench version."
      wide
      work={useAddKeepOutBox(benchVersionId)}
      fields={boxFields}
    />
  );
}

/** Takes one solid off, asking first: a mesh would have to be sent again. */
export function DropKeepOut({ id, name, shape }: { id: string; name: string; shape: "box" | "mesh" }) {
  const router = useRouter();
  const [asking, setAsking] = useState(false);
  const drop = useDropKeepOut(id);
  const close = () => setAsking(false);
  const press = () => {
    if (drop.isPending) return;
    drop.mutate(
      {},
      {
        onSuccess: () => {
          close();
          router.refresh();
        },
      },
    );
  };
  return (
    <>
      <Button small onClick={() => setAsking(true)}>
        Take off <span className="sr-only">{name} </span>…
      </Button>
      <Dialog
        open={asking}
        onClose={close}
        title={`Take ${name} off?`}
        closeWords="Leave it"
        actions={
          <Button kind="danger" busy={drop.isPending} busyWords="Taking off …" onClick={press}>
            Take {name} off
          </Button>
        }
      >
        <p>
          Models are no longer compared with it.{" "}
          {shape === "mesh"
            ? "To have it back, its file is sent again."
            : "To have it back, its corners are typed again."}
        </p>
        {drop.error ? (
          <Notice kind="wrong" title="not done" live="alert">
            <p>{drop.error.detail}</p>
          </Notice>
        ) : null}
      </Dialog>
    </>
  );
}
