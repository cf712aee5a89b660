"use client";

import Link from "next/link";
import { useEffect, useRef, useState, type MouseEvent } from "react";
import { ActForm } from "@/components/ui/act/act-form";
import { buttonClass } from "@/components/ui/button-class";
import { Fold } from "@/components/ui/fold";
import { useSaveComparison } from "@/lib/client/saved";
import type { SavedComparison } from "@/lib/contracts/saved";
import { comparisonFields } from "./comparison-fields";
import { CopyLink } from "./copy-link";

export type SaveComparisonProps = {
  signedIn: boolean;
  /** The comparison's address as the page was asked for; the level that stands in the address now wins. */
  address: string;
  /** What it is called until somebody names it. */
  name: string;
  /** The form stands open: the person comes back from signing in. */
  open: boolean;
};

/** The address with the level as the slider left it, and without what only opens the form. */
function presentAddress(address: string): string {
  const level = new URLSearchParams(window.location.search).get("level");
  const url = new URL(address, window.location.origin);
  if (level !== null) url.searchParams.set("level", level);
  return `${url.pathname}${url.search}`.replaceAll("%2C", ",");
}

const signInAddress = (address: string) => `/sign-in?to=${encodeURIComponent(`${address}&save=1`)}`;

/** Saves what is laid over the baseline under a name; who is signed out signs in first and comes back to it. */
export function SaveComparison({ signedIn, address, name, open }: SaveComparisonProps) {
  const [saved, setSaved] = useState<SavedComparison>();
  const box = useRef<HTMLDivElement>(null);
  const { mutate, isPending, error } = useSaveComparison();

  useEffect(() => {
    if (signedIn && open) box.current?.querySelector<HTMLInputElement>("input")?.focus();
  }, [signedIn, open]);

  if (!signedIn) {
    const withPresentLevel = (event: MouseEvent<HTMLAnchorElement>) => {
      event.currentTarget.href = signInAddress(presentAddress(address));
    };
    return (
      <p className="screen-only mt-4">
        {/* A plain link: its address is made when it is pressed. */}
        <a href={signInAddress(address)} className={buttonClass("outline", true)} onClick={withPresentLevel}>
          Sign in to save this comparison
        </a>
      </p>
    );
  }
  const work = {
    isPending,
    error,
    mutate: (values: Readonly<Record<string, unknown>>, { onSuccess }: { onSuccess: () => void }) =>
      mutate(
        { ...values, address: presentAddress(address) },
        {
          onSuccess: (made) => {
            setSaved(made);
            onSuccess();
          },
        },
      ),
  };
  return (
    <div ref={box} className="screen-only mt-4">
      <Fold title="Save this comparison" open={open}>
        <ActForm
          label="Save this comparison"
          fields={comparisonFields({ name, note: "", shared: false })}
          work={work}
          words="Save"
          busyWords="Saving …"
        />
        <div role="status" className="mt-3 grid gap-1">
          {saved ? (
            <p>
              Saved as “{saved.name}” among <Link href="/my/comparisons">your saved comparisons</Link>.
            </p>
          ) : null}
          {saved?.sharedAddress ? <CopyLink path={saved.sharedAddress} words="Copy the shared link" /> : null}
        </div>
      </Fold>
    </div>
  );
}
