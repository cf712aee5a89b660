import type { Metadata } from "next";
import Link from "next/link";
import { SignUpForm } from "@/components/accounts/mail-forms";
import { Section } from "@/components/ui/sheet";

export const metadata: Metadata = { title: "Make an account" };

export default function SignUpPage() {
  return (
    <Section id="sign-up" title="Make an account" level={1}>
      <p className="mb-4 max-w-2xl">
        With an account you keep designs and their revisions, comparisons and searches. Reading needs none.
      </p>
      <SignUpForm />
      <p className="mt-4">
        You have one? <Link href="/sign-in">Sign in</Link>.
      </p>
    </Section>
  );
}
