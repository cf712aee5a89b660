import type { CrossingStep } from "@/lib/client/fit/crossing-steps";

const place = (angleRad: number, radius: number) => ({
  x: radius * Math.sin(angleRad),
  y: -radius * Math.cos(angleRad),
});

const wedge = (angleRad: number, from: number, to: number, halfRad: number): string => {
  const corners = [
    place(angleRad - halfRad, from),
    place(angleRad - halfRad * 0.7, to),
    place(angleRad + halfRad * 0.7, to),
    place(angleRad + halfRad, from),
  ];
  return `M${corners.map(({ x, y }) => `${x.toFixed(2)} ${y.toFixed(2)}`).join("L")}Z`;
};

/** Rotor 1 within, solid; rotor 2 around it, outlined; blades in line are joined by a stroke. */
export function CrossingsDiagram({ now, words }: { now: CrossingStep; words: string }) {
  const half = (count: number) => Math.min(0.16, 1.1 / count);
  const inLine = new Set(now.pairs.map((pair) => pair.first));
  const inLineSecond = new Set(now.pairs.map((pair) => pair.second));
  return (
    <svg viewBox="-104 -104 208 208" className="w-full max-w-80" role="img" aria-label={words}>
      <circle r="18" fill="none" stroke="var(--soft)" />
      <circle r="59" fill="none" stroke="var(--rule)" strokeDasharray="2 3" />
      {now.firstRad.map((angle, i) => (
        <path
          key={i}
          d={wedge(angle, 20, 55, half(now.firstRad.length) * 1.6)}
          fill={inLine.has(i) ? "var(--ink)" : "var(--graph)"}
        />
      ))}
      {now.secondRad.map((angle, i) => (
        <path
          key={i}
          d={wedge(angle, 63, 98, half(now.secondRad.length))}
          fill={inLineSecond.has(i) ? "var(--ink)" : "var(--paper)"}
          stroke="var(--ink)"
          strokeWidth="1.5"
        />
      ))}
      {now.pairs.map(({ first }) => {
        const angle = now.firstRad[first] ?? 0;
        const [from, to] = [place(angle, 14), place(angle, 103)];
        return <line key={first} x1={from.x} y1={from.y} x2={to.x} y2={to.y} stroke="var(--ink)" strokeWidth="2" />;
      })}
    </svg>
  );
}
