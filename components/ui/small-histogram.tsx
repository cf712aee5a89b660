export type HistogramBin = { from: number; to: number; count: number };

export type SmallHistogramProps = {
  bins: readonly HistogramBin[];
  /** The chosen span; bins that touch it are filled. Open ends reach to the edge. */
  from?: number;
  to?: number;
  /** One sentence for those who hear it. */
  summary: string;
};

/** A small histogram for a range: no axes, what stands below it carries the figures. Empty bins give nothing. */
export function SmallHistogram({ bins, from, to, summary }: SmallHistogramProps) {
  const first = bins[0];
  const last = bins[bins.length - 1];
  if (!first || !last) return null;
  const most = Math.max(1, ...bins.map((bin) => bin.count));
  const span = last.to - first.from || 1;
  return (
    <svg role="img" aria-label={summary} className="small-histogram" viewBox="0 0 100 40" preserveAspectRatio="none">
      {bins.map((bin) => {
        const height = (bin.count / most) * 38;
        const within = bin.to > (from ?? -Infinity) && bin.from < (to ?? Infinity);
        return (
          <rect
            key={bin.from}
            className={within ? "bin bin-in" : "bin"}
            x={((bin.from - first.from) / span) * 100 + 0.3}
            width={((bin.to - bin.from) / span) * 100 - 0.6}
            y={40 - height}
            height={height}
          />
        );
      })}
    </svg>
  );
}
