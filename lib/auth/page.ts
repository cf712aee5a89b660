import { forbidden, notFound, redirect } from "next/navigation";
import { isPerson, type Person } from "@/lib/domain/accounts/actor";
import { ExpectedError } from "@/lib/domain/expected-error";
import { actorFromPage } from "./actor";

/** The person who looks at a page; somebody signed out is sent to sign in and comes back to `path`. */
export async function personForPage(path: string): Promise<Person> {
  const actor = await actorFromPage();
  if (!isPerson(actor)) redirect(`/sign-in?to=${encodeURIComponent(path)}`);
  return actor;
}

/** What a use-case gives to a page; its refusals become the pages made for them, other errors go on. */
export async function orPageState<T>(work: Promise<T>, path: string): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (!(error instanceof ExpectedError)) throw error;
    if (error.code === "not_signed_in") redirect(`/sign-in?to=${encodeURIComponent(path)}`);
    if (error.code === "forbidden") forbidden();
    if (error.code === "not_found" || error.code === "gone") notFound();
    throw error;
  }
}
