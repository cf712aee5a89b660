"use client";

import { Notice } from "@/components/ui/notice";
import { useTryLevels } from "@/lib/client/host";

/** What a choice of levels would have done to the entries that are public now. */
export function LevelsTry({ levels }: { levels: readonly number[] }) {
  const { data, error, isFetching } = useTryLevels(levels);
  if (levels.length === 0) return null;
  return (
    <Notice title="What these levels would have done" live="status">
      {isFetching && !data ? <p>Reading past entries …</p> : null}
      {error ? <p>{error.detail}</p> : null}
      {data ? (
        <>
          <p>
            {data.unranked} of {data.entries} past entries would be left unranked.
          </p>
          <ul className="list-[square] pl-5">
            {data.byLevel.map((each) => (
              <li key={each.levelDba}>
                At {each.levelDba} dB(A) at the bench’s microphone {each.entryNotReached} don’t reach it; of{" "}
                {each.baselineNotReached} the session’s baseline doesn’t
              </li>
            ))}
          </ul>
        </>
      ) : null}
    </Notice>
  );
}
