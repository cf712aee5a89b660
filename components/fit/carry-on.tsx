"use client";

import Link from "next/link";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { keepModel } from "@/lib/client/fit/kept-model";
import type { RotorTraits } from "@/lib/client/fit/messages";
import { loadAnew } from "@/lib/client/session-paths";
import type { CarryChoices } from "@/lib/contracts/carry";
import { CarryForm } from "./carry-form";

/** As many as a revision holds. */
const ROTORS_MAX = 4;

export type CarryOnProps = {
  model: { file: File; mmPerUnit: number };
  rotors: readonly RotorTraits[];
  frameKey: string;
  /** Null for somebody signed out. */
  choices: CarryChoices | null;
  open: boolean;
  onOpen: (open: boolean) => void;
};

/** The way from a model on this page into a draft: signing in on the way, with the model kept in this browser. */
export function CarryOn({ model, rotors, frameKey, choices, open, onOpen }: CarryOnProps) {
  const [fault, setFault] = useState<string>();
  if (rotors.length === 0 || rotors.length > ROTORS_MAX) {
    return (
      <p className="max-w-3xl">
        {rotors.length === 0 ? "No rotor was found" : `More than ${ROTORS_MAX} rotors were found`}, so that no draft can
        be made of it from here. Make the revision under <Link href="/my/designs">My designs</Link>, declare its rotors,
        and send the file there.
      </p>
    );
  }
  const signIn = () =>
    keepModel(model)
      .then(() => loadAnew(`/sign-in?to=${encodeURIComponent("/fit")}`))
      .catch(() =>
        setFault("There is no room in this browser to keep the model. Sign in first, then choose it again."),
      );
  return (
    <div className="grid gap-4">
      <div className="flex flex-wrap items-center gap-3">
        <Button
          kind={open ? "outline" : "solid"}
          aria-expanded={choices ? open : undefined}
          onClick={() => (choices ? onOpen(!open) : void signIn())}
        >
          {open && choices ? "Leave it here" : "Carry it on into a draft"}
        </Button>
        {choices ? null : (
          <span className="small-print">
            You sign in on the way. The model stays in this browser meanwhile and is here again afterwards.
          </span>
        )}
      </div>
      {fault ? (
        <Notice kind="wrong" live="alert">
          <p>{fault}</p>
        </Notice>
      ) : null}
      {open && choices ? <CarryForm model={model} rotors={rotors} frameKey={frameKey} choices={choices} /> : null}
    </div>
  );
}
