import type { ReactNode } from "react";

export type StateProps = { title: string; children?: ReactNode; action?: ReactNode };

function State({ title, children, action, mark }: StateProps & { mark: string }) {
  return (
    <div className="grid max-w-2xl content-start gap-1.5 py-4">
      <p aria-hidden className="figures text-2xl leading-none text-soft">
        {mark}
      </p>
      <p className="text-lg font-bold">{title}</p>
      {children ? <div>{children}</div> : null}
      {action ? <div className="mt-2 flex flex-wrap gap-3">{action}</div> : null}
    </div>
  );
}

/** Nothing here yet, or nothing that fits; says what to do next. */
export function EmptyState(props: StateProps) {
  return <State {...props} mark="– – –" />;
}

/** Part or all of it failed: what, where, and what to do. */
export function ErrorState({ requestId, children, ...rest }: StateProps & { requestId?: string }) {
  return (
    <div role="alert">
      <State {...rest} mark="⌁">
        {children}
        {requestId ? <p className="docket mt-1">Request {requestId}</p> : null}
      </State>
    </div>
  );
}

/** No connection: what was typed is kept. */
export function OfflineState(props: StateProps) {
  return <State {...props} mark="○ ╌ ○" />;
}

/** Not for this person. */
export function ForbiddenState(props: StateProps) {
  return <State {...props} mark="▭" />;
}

/** Was here once, with the reason why it went. */
export function GoneState(props: StateProps) {
  return <State {...props} mark="╌ ╌ ╌" />;
}

/** Something is on its way: bars in the shape of the table to come. */
export function LoadingState({ label = "Reading", rows = 6 }: { label?: string; rows?: number }) {
  return (
    <div role="status" className="py-2">
      <span className="sr-only">{label} …</span>
      <div aria-hidden>
        {Array.from({ length: rows }, (_, row) => (
          <div key={row} className={row % 4 < 2 ? "h-8 bg-bar" : "h-8"} />
        ))}
      </div>
    </div>
  );
}
