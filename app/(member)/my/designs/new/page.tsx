import type { Metadata } from "next";
import { NewDesignForm } from "@/components/designs/new-design-form";
import { Section } from "@/components/ui/sheet";
import { personForPage } from "@/lib/auth/page";

export const metadata: Metadata = { title: "Make a design" };

export default async function NewDesignPage() {
  await personForPage("/my/designs/new");
  return (
    <Section
      id="design"
      title="Make a design"
      level={1}
      note="A design lasts over seasons; each geometry is a revision of it. Nothing of it is public before its round is published."
    >
      <NewDesignForm />
    </Section>
  );
}
