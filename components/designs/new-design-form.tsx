"use client";

import { useRouter } from "next/navigation";
import { ActForm } from "@/components/ui/act/act-form";
import { useMakeDesign } from "@/lib/client/own-designs";

/** Makes a design and goes on to it. */
export function NewDesignForm() {
  const router = useRouter();
  const { mutate, isPending, error } = useMakeDesign();
  return (
    <ActForm
      label="Make a design"
      fields={[
        { name: "name", label: "Name", hint: "Its address is made of it and stays for ever." },
        { name: "summary", label: "Summary", kind: "area", optional: true },
      ]}
      work={{
        isPending,
        error,
        mutate: (values, { onSuccess }) =>
          mutate(values, {
            onSuccess: ({ slug }) => {
              onSuccess();
              router.push(`/my/designs/${slug}`);
            },
          }),
      }}
      words="Make the design"
      busyWords="Making …"
    />
  );
}
