import { Notice } from "@/components/ui/notice";
import type { ApiError } from "@/lib/client/fetcher";

const titles: Readonly<Record<string, string>> = {
  moved_on: "it has moved on",
  already_there: "already there",
  impossible: "that can't be",
  offline: "no connection",
};

/** Why a write was refused, with each field; what was typed stays where it is. */
export function Refusal({ error, fields = true }: { error: ApiError | null; fields?: boolean }) {
  if (!error) return null;
  return (
    <Notice kind="wrong" title={titles[error.code] ?? "not kept"} live="alert">
      <p>{error.detail}</p>
      {fields && error.fields.length > 0 ? (
        <ul className="list-[square] pl-5">
          {error.fields.map((field) => (
            <li key={`${field.path} ${field.message}`}>
              {field.path} {field.message}
            </li>
          ))}
        </ul>
      ) : null}
      {error.code === "moved_on" ? <p>Beside it you now see how it stands; your typing is kept.</p> : null}
      {error.code === "unexpected" && error.requestId ? <p>Request {error.requestId}</p> : null}
    </Notice>
  );
}
