import { z } from "zod";
import { ROLES } from "@/lib/domain/accounts/actor";
import { pageOf, pageQuery, time } from "./base";

/** A person as the host's list shows them. */
export const personItem = z.strictObject({
  personId: z.uuid(),
  handle: z.string(),
  email: z.string(),
  role: z.enum(ROLES),
  verified: z.boolean(),
  createdAt: time,
  closedAt: time.nullable(),
});
export type PersonItem = z.infer<typeof personItem>;

export const peoplePage = pageOf(personItem);
export type PeoplePage = z.infer<typeof peoplePage>;

export const peopleQuery = z.strictObject({
  ...pageQuery,
  contains: z.string().trim().max(100).optional(),
  role: z.enum(ROLES).optional(),
});
export type PeopleQuery = z.infer<typeof peopleQuery>;

/** `was` is the role that the host saw: if it is another by now, nothing is changed. */
export const roleBody = z.strictObject({ role: z.enum(ROLES), was: z.enum(ROLES) });
