/**
 * "120 × 25" for the key "120x25": a frame's side and depth, both in mm; "120 × 25 narrow" for "120x25-narrow". Any other
 * key stands as it is.
 */
export function formatFrame(key: string): string {
  return /^\d+x\d+(-\w+)?$/.test(key) ? key.replace("x", " × ").replace("-", " ") : key;
}
