"use client";

import { useRef, useState } from "react";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Progress } from "@/components/ui/progress";
import type { Uploading } from "@/lib/client/uploads";
import { uploadPurposes, type UploadAnswer, type UploadPurpose } from "@/lib/contracts/uploads";

const purposes = {
  model: "Model",
  source: "Source",
  print_profile: "Print profile",
  photograph: "Photograph",
} as const;
type RevisionPurpose = keyof typeof purposes;
const purposeList = Object.keys(purposes) as RevisionPurpose[];
const megabytes = (bytes: number): string => `${(bytes / 1_000_000).toFixed(1)} MB`;
const counted = (count: number): string => count.toLocaleString("en-GB");

/** Chooses a file for a revision, and shows what is on its way: bytes sent, then triangles read. */
export function UploadField({ uploads, uploading }: { uploads: readonly UploadAnswer[]; uploading: Uploading }) {
  const input = useRef<HTMLInputElement>(null);
  const [purpose, setPurpose] = useState<RevisionPurpose>("model");
  const { sending, fault, choose, cancel } = uploading;
  const { maxBytes, kinds } = uploadPurposes[purpose];
  const under = uploads.filter((each) => each.state === "received" || each.state === "sending");
  const newest = uploads[0];
  return (
    <div className="grid gap-4">
      <div className="flex flex-wrap items-end gap-3">
        <label className="grid gap-1">
          <span className="field-label">What it is</span>
          <span className="blank">
            <select value={purpose} onChange={({ target }) => setPurpose(target.value as RevisionPurpose)}>
              {purposeList.map((each) => (
                <option key={each} value={each}>
                  {purposes[each]}
                </option>
              ))}
            </select>
          </span>
        </label>
        <Button kind="solid" busy={sending !== undefined} busyWords="Sending …" onClick={() => input.current?.click()}>
          Choose a file
        </Button>
        <input
          ref={input}
          type="file"
          aria-label="File"
          tabIndex={-1}
          className="sr-only"
          onChange={({ target }) => {
            const file = target.files?.[0];
            if (file) choose(file, purpose);
            target.value = "";
          }}
        />
      </div>
      <p className="small-print">
        Taken are {kinds.filter((kind) => kind !== "unknown").join(", ")} up to {maxBytes / 1_000_000} MB. You may leave
        while the server reads; while bytes are sent, choosing the same file again goes on where it stood.
      </p>
      {fault ? (
        <Notice kind="wrong" live="alert">
          <p>{fault}</p>
        </Notice>
      ) : null}
      {under.map((each) => (
        <OnItsWay key={each.uploadId} upload={each} sent={sending} onCancel={() => cancel(each.uploadId)} />
      ))}
      {sending && !under.some((each) => each.uploadId === sending.uploadId) ? (
        <Bytes
          name={sending.name}
          sent={sending.sentBytes}
          of={sending.bytes}
          onCancel={() => cancel(sending.uploadId)}
        />
      ) : null}
      {newest?.state === "refused" ? (
        <Notice kind="wrong" title={`${newest.name} was not taken`} live="status">
          <p>{newest.reason}</p>
        </Notice>
      ) : null}
    </div>
  );
}

type OnItsWayProps = { upload: UploadAnswer; sent: Uploading["sending"]; onCancel: () => void };

function OnItsWay({ upload, sent, onCancel }: OnItsWayProps) {
  const { name, bytes, progress } = upload;
  if (upload.state === "sending") {
    const here = sent?.uploadId === upload.uploadId;
    return (
      <Bytes
        name={name}
        sent={here ? sent.sentBytes : upload.sentBytes}
        of={bytes}
        paused={!here}
        onCancel={onCancel}
      />
    );
  }
  const { stage, trianglesRead = 0, trianglesExpected } = progress;
  const of = trianglesExpected === undefined ? "" : ` of ${counted(trianglesExpected)}`;
  const words =
    stage === "reading"
      ? `${counted(trianglesRead)}${of} triangles read`
      : stage === "measuring"
        ? `${counted(trianglesRead)} triangles read, being measured`
        : "waits to be read";
  const whole = stage === "reading" ? trianglesExpected : undefined;
  return (
    <Progress
      label={`Reading ${name}`}
      done={trianglesRead}
      words={words}
      onCancel={onCancel}
      {...(whole !== undefined && { of: whole })}
    />
  );
}

type BytesProps = { name: string; sent: number; of: number; paused?: boolean; onCancel: () => void };

function Bytes({ name, sent, of, paused = false, onCancel }: BytesProps) {
  const words = `${megabytes(sent)} of ${megabytes(of)} sent${paused ? ", broke off: choose the file again to go on" : ""}`;
  return <Progress label={`Sending ${name}`} done={sent} of={of} words={words} onCancel={onCancel} />;
}

/** What a purpose is called where files are listed. */
export const purposeWords = (role: UploadPurpose): string =>
  role in purposes ? purposes[role as RevisionPurpose] : role;
