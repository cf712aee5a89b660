"use client";

import { useMutation, type UseMutationResult } from "@tanstack/react-query";
import { useEffect, useRef, useState } from "react";
import type { Upload } from "tus-js-client";
import { designMade, revisionMade } from "@/lib/contracts/own-designs";
import { revisionFiles } from "@/lib/contracts/revision-files";
import { begunUpload } from "@/lib/contracts/uploads";
import { ApiError, getJson, sendJson } from "../fetcher";
import { piecewise } from "../uploads";

/** What is carried where: into a design's draft, into its next revision, or into a design that is made for it. */
export interface CarryOrder {
  readonly file: File;
  readonly mmPerUnit: number;
  readonly design: { readonly slug: string } | { readonly name: string };
  /** A draft's letter, or what is declared of the revision to make. */
  readonly revision: { readonly letter: string } | { readonly body: unknown };
}

export interface Carried {
  readonly slug: string;
  readonly letter: string;
}

export interface Carrying {
  readonly work: UseMutationResult<Carried, ApiError, CarryOrder>;
  /** Bytes that are on their way; undefined while none are. */
  readonly sent: { readonly done: number; readonly of: number } | undefined;
  cancel(): void;
}

const base = "/api/v1/my/designs";

/** Makes what is missing and sends the model. A second try goes on from what the first one made. */
export function useCarrying(): Carrying {
  const [sent, setSent] = useState<Carrying["sent"]>();
  const running = useRef<Upload | undefined>(undefined);
  const stop = useRef<((why: ApiError) => void) | undefined>(undefined);
  const made = useRef<{ order: string; slug?: string; letter?: string }>({ order: "" });
  useEffect(() => () => void running.current?.abort(), []);

  const work = useMutation<Carried, ApiError, CarryOrder>({
    mutationFn: async ({ file, mmPerUnit, design, revision }) => {
      const order = JSON.stringify(design);
      if (made.current.order !== order) made.current = { order };
      const done = made.current;
      done.slug ??= "slug" in design ? design.slug : await make(design.name);
      const { slug } = done;
      done.letter ??= "letter" in revision ? revision.letter : await add(slug, revision.body);
      const { letter } = done;
      const { revisionId } = await getJson(revisionFiles, `${base}/${slug}/revisions/${letter}/files`);
      const body = { purpose: "model", subjectId: revisionId, name: file.name, bytes: file.size, mmPerUnit };
      const { address } = await sendJson(begunUpload, "/api/v1/uploads", { method: "POST", body });
      await new Promise<void>((resolve, reject) => {
        stop.current = reject;
        setSent({ done: 0, of: file.size });
        running.current = piecewise(file, address, {
          onProgress: (bytes) => setSent({ done: bytes, of: file.size }),
          onError: () => reject(new ApiError("offline", `${file.name} broke off. Press again to send it anew.`)),
          onSuccess: () => resolve(),
        });
        running.current.start();
      }).finally(() => setSent(undefined));
      return { slug, letter };
    },
  });

  return {
    work,
    sent,
    cancel() {
      void running.current?.abort();
      stop.current?.(new ApiError("offline", "Sending was cancelled. The draft is there; the model isn’t in it yet."));
    },
  };
}

const make = async (name: string): Promise<string> =>
  (await sendJson(designMade, base, { method: "POST", body: { name, summary: "" } })).slug;

const add = async (slug: string, body: unknown): Promise<string> =>
  (await sendJson(revisionMade, `${base}/${slug}/revisions`, { method: "POST", body })).letter;
