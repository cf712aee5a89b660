import Link from "next/link";

/** Three leaves of listing paper, folded to and fro, with the holes of the top leaf. */
export function FoldMark({ size = 30 }: { size?: number }) {
  return (
    <svg aria-hidden width={size} height={size * 0.8} viewBox="0 0 30 24" fill="none" stroke="currentColor">
      <path d="M3 5.5 15 2l12 3.5L15 9Z" strokeWidth="1.7" strokeLinejoin="round" />
      <path d="m3 5.5 0 6.5 12 3.5 12-3.5" strokeWidth="1.7" strokeLinejoin="round" strokeDasharray="1.6 1.8" />
      <path d="m3 12 12 3.5L27 12M3 18.5 15 22l12-3.5" strokeWidth="1.7" strokeLinejoin="round" />
    </svg>
  );
}

/** The name, and the way home. */
export function Wordmark() {
  return (
    <Link href="/" className="wordmark" aria-label="Fanfold, to the front page">
      <FoldMark />
      <span>Fanfold</span>
    </Link>
  );
}
