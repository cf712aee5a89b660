import type { Metadata } from "next";
import { redirect } from "next/navigation";
import { ResetForm } from "@/components/accounts/mail-forms";
import { Section } from "@/components/ui/sheet";

export const metadata: Metadata = { title: "Set a new password", referrer: "no-referrer", robots: { index: false } };

export default async function NewPasswordPage({
  searchParams,
}: {
  searchParams: Promise<{ token?: string | string[] }>;
}) {
  const { token } = await searchParams;
  if (typeof token !== "string") redirect("/reset");
  return (
    <Section id="reset-new" title="Set a new password" level={1}>
      <ResetForm token={token} />
    </Section>
  );
}
