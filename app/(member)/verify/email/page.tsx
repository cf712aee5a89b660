import type { Metadata } from "next";
import { notFound } from "next/navigation";
import { ConfirmEmailForm } from "@/components/accounts/mail-forms";
import { Section } from "@/components/ui/sheet";

export const metadata: Metadata = { title: "Use a new address", referrer: "no-referrer", robots: { index: false } };

export default async function NewEmailPage({ searchParams }: { searchParams: Promise<{ token?: string | string[] }> }) {
  const { token } = await searchParams;
  if (typeof token !== "string") notFound();
  return (
    <Section id="new-email" title="Use a new address" level={1}>
      <p className="mb-4 max-w-2xl">From then on you sign in with this address, and letters go to it.</p>
      <ConfirmEmailForm token={token} />
    </Section>
  );
}
