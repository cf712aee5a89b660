import type { DrawnView } from "@/lib/science/geometry/drawing/drawn-view";

/** At a scale as long as there is room for it; or as wide as a share of what it stands in. */
export type ViewSvgProps = { view: DrawnView } & (
  { pxPerMm: number; width?: never } | { width: string; pxPerMm?: never }
);

/** One view in the ink of the page; `pxPerMm` keeps two views at one scale as long as there is room. */
export function ViewSvg({ view, pxPerMm, width }: ViewSvgProps) {
  const { textMm, outlines, centres, dashed, dimensions, words } = view;
  const line = textMm / 14;
  const dash = (...parts: number[]) => parts.map((part) => part * textMm).join(" ");
  return (
    <svg
      role="img"
      aria-label={view.title}
      viewBox={`${view.minX} ${view.minY} ${view.width} ${view.height}`}
      style={{ width: width ?? `${Math.round(view.width * pxPerMm)}px` }}
      className="h-auto max-w-full"
    >
      <g stroke="var(--ink)" strokeWidth={line} strokeLinecap="round" strokeLinejoin="round">
        {outlines.map(({ d, covers }, index) => (
          <path key={index} d={d} fill={covers ? "var(--paper)" : "none"} />
        ))}
      </g>
      <g stroke="var(--soft)" strokeWidth={line / 2} fill="none">
        <path d={centres} strokeDasharray={dash(1.6, 0.3, 0.3, 0.3)} />
        <path d={dashed} strokeDasharray={dash(0.6, 0.4)} />
        <path d={dimensions} />
      </g>
      <g fill="var(--ink)" fontFamily="var(--figures)" fontSize={textMm} textAnchor="middle">
        {words.map(({ x, y, text, upright }, index) => (
          <text key={index} x={x} y={y} transform={upright ? `rotate(-90 ${x} ${y})` : undefined}>
            {text}
          </text>
        ))}
      </g>
    </svg>
  );
}
