import type { Metadata } from "next";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";

export const metadata: Metadata = { title: "Not found" };

export default function NotFound() {
  return (
    <Section id="not-found" title="There is nothing at this address" level={1}>
      <EmptyState
        title="Mistyped, or not published"
        action={<LinkButton href="/designs">Find it in the index</LinkButton>}
      >
        What isn&apos;t published can&apos;t be seen from outside, so this page looks the same for both.
      </EmptyState>
    </Section>
  );
}
