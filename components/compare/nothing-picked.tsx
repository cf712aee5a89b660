import { ClipBar } from "@/components/shell/clip-bar";
import { LinkButton } from "@/components/ui/button";
import { Section } from "@/components/ui/sheet";
import { EmptyState } from "@/components/ui/states";

/** The page before anything is picked, or when nothing that was asked for is public. */
export function NothingPicked({ unknown }: { unknown: boolean }) {
  return (
    <>
      <Section id="compare" title="Compare" level={1}>
        <EmptyState
          title={unknown ? "None of these entries is public" : "Nothing is clipped yet"}
          action={
            <LinkButton kind="solid" href="/designs">
              To the index
            </LinkButton>
          }
        >
          {unknown ? <p>The address may have a slip in it, or what it names was withdrawn. </p> : null}
          <p>
            In the index, fill the slot before a design’s name to clip it: two to four fit. Then press “Lay over the
            baseline”. Or write the address yourself:{" "}
            <code className="figures text-sm break-all">
              /compare?entries=design.a.season-1,other-design.b.season-1
            </code>
          </p>
        </EmptyState>
      </Section>
      <ClipBar />
    </>
  );
}
