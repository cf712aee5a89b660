import type { ActField } from "@/components/ui/act/act-values";

/** What a saved comparison is given: the same fields when it is saved and when it is changed. */
export function comparisonFields(values: { name: string; note: string; shared: boolean }): ActField[] {
  return [
    { name: "name", label: "Name", defaultValue: values.name },
    {
      name: "note",
      label: "Note",
      kind: "area",
      optional: true,
      defaultValue: values.note,
      hint: "Whoever opens the shared link reads it too.",
    },
    {
      name: "shared",
      label: "Share it: anybody who has the link may read it",
      kind: "tick",
      defaultValue: values.shared ? "on" : undefined,
    },
  ];
}
