import { formatRankRange } from "@/lib/format/ranks";

/** A rank's 95 % range in words, with a bar from the best to the worst place among so many. */
export function RankRange({ rank, low, high, of }: { rank: number; low: number; high: number; of: number }) {
  const x = (place: number): number => (of <= 1 ? 50 : ((place - 1) / (of - 1)) * 86 + 7);
  return (
    <span className="inline-flex items-center gap-3 whitespace-nowrap">
      <svg aria-hidden width="100" height="14" viewBox="0 0 100 14" className="flex-none">
        <line x1="1" x2="99" y1="7" y2="7" stroke="var(--rule)" strokeWidth="1" />
        <line x1={x(low) - 1} x2={x(high) + 1} y1="7" y2="7" stroke="currentColor" strokeWidth="4" />
        <circle cx={x(rank)} cy="7" r="4.5" fill="var(--paper)" stroke="currentColor" strokeWidth="2" />
      </svg>
      {formatRankRange(low, high)}
    </span>
  );
}
