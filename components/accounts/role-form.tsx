"use client";

import { useRouter } from "next/navigation";
import { useState } from "react";
import { Button } from "@/components/ui/button";
import { useChangeRole } from "@/lib/client/accounts";
import type { PersonItem } from "@/lib/contracts/people";
import { ROLES, type Role } from "@/lib/domain/accounts/actor";

/** Gives, changes or takes one person's role. Nothing is sent before the button is pressed. */
export function RoleForm({ person, own }: { person: PersonItem; own: boolean }) {
  const router = useRouter();
  const [role, setRole] = useState<Role>(person.role);
  const mutation = useChangeRole(person.personId);
  const change = () => mutation.mutate({ role, was: person.role }, { onSuccess: () => router.refresh() });
  return (
    <span className="flex flex-wrap items-center gap-2">
      <span className="blank">
        <select
          aria-label={`Role of ${person.handle}`}
          value={role}
          onChange={(event) => setRole(ROLES.find((each) => each === event.currentTarget.value) ?? person.role)}
        >
          {ROLES.map((each) => (
            <option key={each}>{each}</option>
          ))}
        </select>
      </span>
      {role === person.role ? null : (
        <Button small busy={mutation.isPending} busyWords="Changing …" onClick={change}>
          {own ? "Change my own role and sign out" : `Make ${person.handle} ${role}`}
        </Button>
      )}
      <span role="status" className="field-error empty:hidden">
        {mutation.error?.detail}
      </span>
    </span>
  );
}
