"use client";

import { Button } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import { ErrorState } from "@/components/ui/states";

export default function PageError({ error, reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <Section id="error" title="This page didn't work" level={1}>
      <ErrorState
        title="The fault is ours"
        requestId={error.digest}
        action={
          <Button kind="solid" onClick={reset}>
            Try again
          </Button>
        }
      >
        Nothing that you sent before is lost. If it happens again, tell the host the number below.
      </ErrorState>
    </Section>
  );
}
