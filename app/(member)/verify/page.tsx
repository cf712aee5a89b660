import type { Metadata } from "next";
import { SendVerificationForm, VerifyForm } from "@/components/accounts/mail-forms";
import { Section } from "@/components/ui/sheet";

export const metadata: Metadata = { title: "Confirm your address", referrer: "no-referrer", robots: { index: false } };

export default async function VerifyPage({ searchParams }: { searchParams: Promise<{ token?: string | string[] }> }) {
  const { token } = await searchParams;
  return (
    <Section id="verify" title="Confirm your address" level={1}>
      {typeof token === "string" ? (
        <VerifyForm token={token} />
      ) : (
        <>
          <p className="mb-4 max-w-2xl">The letter didn&apos;t come, or its link has run out? Have it sent again.</p>
          <SendVerificationForm />
        </>
      )}
    </Section>
  );
}
