/** So many ends by itself within a while are borne; a machine in trouble isn't made busier by starts without end. */
const borne = { ends: 5, withinMs: 60_000 };

/** Counts the ends of one process. @returns a function to call at each end: whether to start it once more */
export function bearEnds(): () => boolean {
  let ends: number[] = [];
  return () => {
    const now = Date.now();
    ends = [...ends.filter((at) => at > now - borne.withinMs), now];
    return ends.length <= borne.ends;
  };
}
