import type { Person } from "@/lib/domain/accounts/actor";
import { askForNewEmail, confirmNewEmail } from "@/lib/server/accounts/email";
import { testPassword } from "../../factories/people";
import { tokenOf, type Letters } from "../../setup/letters";

/** Asks for another address and spends the token of the letter that goes there. */
export async function changeEmail(person: Person, email: string, letters: Letters): Promise<void> {
  await askForNewEmail(person, { email, currentPassword: testPassword });
  const token = tokenOf(await letters.newest(email, "Confirm your new address"));
  await confirmNewEmail({ token, requestId: "test" });
}
