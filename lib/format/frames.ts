/** "120 × 25" for the key "120x25": a frame's side and depth, both in mm. Any other key stands as it is. */
export function formatFrame(key: string): string {
  return /^\d+x\d+$/.test(key) ? key.replace("x", " × ") : key;
}
