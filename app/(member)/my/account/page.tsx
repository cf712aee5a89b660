import type { Metadata } from "next";
import {
  ChangeEmailForm,
  ChangeHandleForm,
  ChangePasswordForm,
  CloseForm,
  EraseForm,
} from "@/components/accounts/account-forms";
import { MailChoicesForm } from "@/components/accounts/mail-choices-form";
import { Section } from "@/components/ui/sheet";
import { orPageState, personForPage } from "@/lib/auth/page";
import { formatDate } from "@/lib/format/dates";
import { readAccount } from "@/lib/server/accounts/account";

export const metadata: Metadata = { title: "Your account" };

const path = "/my/account";

export default async function AccountPage() {
  const account = await orPageState(readAccount(await personForPage(path)), path);
  return (
    <>
      <Section id="account" title="Your account" level={1}>
        <p>
          {account.email} · {account.role} · since {formatDate(account.createdAt)}
        </p>
      </Section>
      <Section id="mail" title="Tell me by mail when">
        <MailChoicesForm start={account.mailChoices} />
      </Section>
      <Section id="handle" title="Handle">
        <ChangeHandleForm handle={account.handle} />
      </Section>
      <Section id="email" title="Address">
        <ChangeEmailForm />
      </Section>
      <Section id="password" title="Password">
        <ChangePasswordForm />
      </Section>
      <Section id="close" title="Leave">
        <div className="grid gap-8 md:grid-cols-2">
          <div>
            <p className="mb-4">
              Closed, nobody can sign in to the account. Your designs and their figures stay, under your handle.
            </p>
            <CloseForm />
          </div>
          <div>
            <p className="mb-4">
              Or have your name cut as well: address, handle, choices and lists are deleted. Published figures stay and
              name nobody. It can&apos;t be taken back.
            </p>
            <EraseForm />
          </div>
        </div>
      </Section>
    </>
  );
}
