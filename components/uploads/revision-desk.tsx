"use client";

import Link from "next/link";
import { Button } from "@/components/ui/button";
import { Notice } from "@/components/ui/notice";
import { Section } from "@/components/ui/sheet";
import { useFilesFollowUploads, useRemoveFile, useRevisionFiles, useUploading, useUploads } from "@/lib/client/uploads";
import type { RevisionFiles } from "@/lib/contracts/revision-files";
import { TraitConfirmation } from "./trait-confirmation";
import { purposeWords, UploadField } from "./upload-field";

/** How sure the reader is of what it found, in whole percent; empty where it found nothing to be sure of. */
function sureWords({ confidence, sure }: NonNullable<RevisionFiles["reading"]>): string {
  const parts = [
    ["rotors", confidence],
    ["struts", sure.struts],
    ["inlet stack", sure.inletStack],
    ["spacer", sure.spacer],
  ] as const;
  return parts.flatMap(([what, share]) => (share === null ? [] : [`${what} ${Math.round(100 * share)} %`])).join(", ");
}

/** Files of a revision of one's own, sending one, and the traits that its model tells. */
export function RevisionDesk({ slug, first }: { slug: string; first: RevisionFiles }) {
  const { data: revision = first } = useRevisionFiles(slug, first.letter, first);
  const { data: uploads = [] } = useUploads(revision.revisionId);
  const uploading = useUploading(revision.revisionId, uploads);
  useFilesFollowUploads(slug, first.letter, uploads);
  const remove = useRemoveFile(slug, first.letter);
  const { reading } = revision;
  return (
    <>
      <Section
        id="files"
        title={`Files of ${revision.designName} ${revision.letter}`}
        level={1}
        aside={<Link href={`/my/designs/${slug}`}>The design</Link>}
      >
        {revision.files.length === 0 ? <p>No file yet.</p> : null}
        <ul className="mb-4 space-y-2">
          {revision.files.map(({ attachmentId, role, name, bytes, gone }) => (
            <li key={attachmentId} className="flex flex-wrap items-baseline gap-3">
              <span className="docket">{purposeWords(role)}</span>
              {gone ? <span>{name}, taken down</span> : <a href={`/api/v1/files/${attachmentId}`}>{name}</a>}
              <span className="num">{(bytes / 1_000_000).toFixed(2)} MB</span>
              {revision.sentIn ? null : (
                <Button small onClick={() => remove.mutate(attachmentId)} aria-label={`Take ${name} off`}>
                  Take off
                </Button>
              )}
            </li>
          ))}
        </ul>
        {revision.sentIn ? (
          <p>This revision was sent in: its files don’t change.</p>
        ) : (
          <UploadField uploads={uploads} uploading={uploading} />
        )}
      </Section>
      <Section
        id="traits"
        title="Traits"
        note={reading ? `Read from ${reading.name}: ${reading.triangles.toLocaleString("en-GB")} triangles.` : null}
      >
        {reading && reading.warnings.length > 0 ? (
          <Notice title="What the reader is unsure of" className="mb-4">
            <ul className="list-[square] pl-5">
              {reading.warnings.map(({ code, message }, n) => (
                <li key={`${code} ${n}`}>{message}</li>
              ))}
            </ul>
          </Notice>
        ) : null}
        {reading && sureWords(reading) !== "" ? (
          <p className="mb-4">How sure the reader is: {sureWords(reading)}.</p>
        ) : null}
        {revision.sentIn ? (
          <p>They hold as they were confirmed.</p>
        ) : (
          <TraitConfirmation key={reading?.attachmentId} slug={slug} revision={revision} />
        )}
      </Section>
    </>
  );
}
