import type { Metadata } from "next";
import { AskForResetForm } from "@/components/accounts/mail-forms";
import { Section } from "@/components/ui/sheet";

export const metadata: Metadata = { title: "Set a new password" };

export default function ResetPage() {
  return (
    <Section id="reset" title="Set a new password" level={1}>
      <p className="mb-4 max-w-2xl">A link to set it comes by mail to your account&apos;s address.</p>
      <AskForResetForm />
    </Section>
  );
}
