"use client";

import { useMutation, useQuery, useQueryClient, type UseQueryResult } from "@tanstack/react-query";
import { useCallback, useEffect, useRef, useState } from "react";
import * as tus from "tus-js-client";
import { revisionFiles, type RevisionFiles } from "@/lib/contracts/revision-files";
import { begunUpload, uploadsAnswer, type UploadAnswer, type UploadPurpose } from "@/lib/contracts/uploads";
import { useWrite, type Act } from "./act";
import { ApiError, getJson, send, sendJson, withQuery } from "./fetcher";
import { keysOf, myDesignKeys } from "./query-keys";

export const uploadKeys = keysOf("uploads");
const pieceBytes = 8_000_000;
const pollMs = 1_000;

/** One's own latest uploads for a revision; asked again and again while the server reads one. */
export function useUploads(subjectId: string): UseQueryResult<UploadAnswer[], ApiError> {
  return useQuery<UploadAnswer[], ApiError>({
    queryKey: uploadKeys.one(subjectId),
    queryFn: async ({ signal }) =>
      (await getJson(uploadsAnswer, withQuery("/api/v1/uploads", { subject: subjectId }), signal)).items,
    refetchInterval: ({ state }) => (state.data?.some((each) => each.state === "received") ? pollMs : false),
  });
}

/** What this page is sending: bytes that the server has acknowledged or that are on their way. */
export interface Sending {
  uploadId: string;
  name: string;
  sentBytes: number;
  bytes: number;
}

export interface Uploading {
  sending: Sending | undefined;
  fault: string | undefined;
  /** Sends a file, or the rest of it where one of this name and length was begun. */
  choose(file: File, purpose: UploadPurpose): void;
  cancel(uploadId: string): void;
}

type Heard = Required<Pick<tus.UploadOptions, "onProgress" | "onError" | "onSuccess">>;

/** A file on its way to the address that its announcement gave, in pieces, each tried again when the line breaks. */
export function piecewise(file: File, address: string, heard: Heard): tus.Upload {
  return new tus.Upload(file, {
    uploadUrl: new URL(address, window.location.href).href,
    chunkSize: pieceBytes,
    retryDelays: [500, 2_000, 5_000, 15_000],
    storeFingerprintForResuming: false,
    ...heard,
  });
}

/** Sends files in pieces by tus. Leaving the page breaks off; choosing the same file again goes on where it stood. */
export function useUploading(subjectId: string, known: readonly UploadAnswer[]): Uploading {
  const client = useQueryClient();
  const [sending, setSending] = useState<Sending>();
  const [fault, setFault] = useState<string>();
  const running = useRef<tus.Upload | undefined>(undefined);
  const refresh = useCallback(
    () => void client.invalidateQueries({ queryKey: uploadKeys.one(subjectId) }),
    [client, subjectId],
  );
  useEffect(() => () => void running.current?.abort(), []);

  const begin = useMutation<void, ApiError, { file: File; purpose: UploadPurpose }>({
    mutationFn: async ({ file, purpose }) => {
      const open = known.find(
        (each) =>
          each.state === "sending" && each.name === file.name && each.bytes === file.size && each.purpose === purpose,
      );
      const body = { purpose, subjectId, name: file.name, bytes: file.size };
      const { uploadId, address } =
        open && open.address !== null
          ? { uploadId: open.uploadId, address: open.address }
          : await sendJson(begunUpload, "/api/v1/uploads", { method: "POST", body });
      const told = { uploadId, name: file.name, bytes: file.size };
      setSending({ ...told, sentBytes: open?.sentBytes ?? 0 });
      running.current = piecewise(file, address, {
        onProgress: (sentBytes) => setSending({ ...told, sentBytes }),
        onError: () => {
          setSending(undefined);
          setFault(`${file.name} broke off. Choose it again to go on where it stood.`);
          refresh();
        },
        onSuccess: () => {
          setSending(undefined);
          refresh();
        },
      });
      running.current.start();
    },
    onError: ({ detail }) => setFault(detail),
  });
  const end = useMutation<void, ApiError, string>({
    mutationFn: (uploadId) => send(`/api/v1/uploads/${uploadId}`, { method: "DELETE" }),
    onError: ({ detail }) => setFault(detail),
    onSettled: refresh,
  });

  return {
    sending,
    fault,
    choose(file, purpose) {
      setFault(undefined);
      begin.mutate({ file, purpose });
    },
    cancel(uploadId) {
      if (sending?.uploadId === uploadId) {
        void running.current?.abort();
        setSending(undefined);
      }
      end.mutate(uploadId);
    },
  };
}

const revisionPath = (slug: string, letter: string): string => `/api/v1/my/designs/${slug}/revisions/${letter}`;
const filesKey = (slug: string, letter: string) => myDesignKeys.one(slug, "files", letter);

/** The files of a revision of one's own, and its traits as read and declared; given first by the page. */
export function useRevisionFiles(
  slug: string,
  letter: string,
  first: RevisionFiles,
): UseQueryResult<RevisionFiles, ApiError> {
  return useQuery<RevisionFiles, ApiError>({
    queryKey: filesKey(slug, letter),
    queryFn: ({ signal }) => getJson(revisionFiles, `${revisionPath(slug, letter)}/files`, signal),
    initialData: first,
  });
}

/** Reads a revision's files anew once an upload is finished. */
export function useFilesFollowUploads(slug: string, letter: string, uploads: readonly UploadAnswer[]): void {
  const client = useQueryClient();
  const read = uploads.filter((each) => each.state === "read").length;
  useEffect(() => {
    void client.invalidateQueries({ queryKey: myDesignKeys.one(slug, "files", letter) });
  }, [client, slug, letter, read]);
}

export const useConfirmTraits = (slug: string, letter: string): Act =>
  useWrite("PUT", `${revisionPath(slug, letter)}/traits`, filesKey(slug, letter));

/** Takes a file off a draft. */
export function useRemoveFile(slug: string, letter: string) {
  const client = useQueryClient();
  return useMutation<void, ApiError, string>({
    mutationFn: (attachmentId) => send(`/api/v1/files/${attachmentId}`, { method: "DELETE" }),
    onSettled: () => client.invalidateQueries({ queryKey: filesKey(slug, letter) }),
  });
}
