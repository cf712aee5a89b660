import { Button } from "@/components/ui/button";
import { Field, Select } from "@/components/ui/field";
import { ROLES, type Role } from "@/lib/domain/accounts/actor";

/** Narrows the list; a plain form, so the choice stands in the address. */
export function PeopleFilter({ contains, role }: { contains: string; role?: Role }) {
  return (
    <form method="get" className="mb-4 flex flex-wrap items-end gap-4">
      <Field label="Handle or address holds" name="contains" defaultValue={contains} maxLength={100} />
      <Select
        label="Role"
        name="role"
        defaultValue={role ?? ""}
        options={[{ value: "", label: "any" }, ...ROLES.map((each) => ({ value: each, label: each }))]}
      />
      <Button type="submit">Show</Button>
    </form>
  );
}
