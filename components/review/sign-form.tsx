"use client";

import { useRouter } from "next/navigation";
import { ActForm } from "@/components/ui/act/act-form";
import { useSignRound } from "@/lib/client/review";

/** Signs what stands on the page; a digest that moved on since is refused. */
export function SignForm({ roundId, sha256 }: { roundId: string; sha256: string }) {
  const router = useRouter();
  const work = useSignRound(roundId);
  return (
    <ActForm
      label="Sign the round"
      fields={[{ name: "note", label: "Note to the signature", kind: "area", optional: true }]}
      work={work}
      more={{ expectedSha256: sha256 }}
      words="Sign the round"
      busyWords="Signing …"
      onDone={() => router.refresh()}
    />
  );
}
