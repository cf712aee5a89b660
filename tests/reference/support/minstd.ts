/** MINSTD s = 16807·s mod (2^31 − 1), u = s/(2^31 − 1): the stream of the check values, used in tests only. */
export function minstd(seed: number): () => number {
  let state = seed;
  return () => {
    state = (16807 * state) % 2147483647;
    return state / 2147483647;
  };
}

/** Nearly normal: the sum of twelve uniforms less six. */
export function twelveSum(uniform: () => number): () => number {
  return () => {
    let total = 0;
    for (let i = 0; i < 12; i++) total += uniform();
    return total - 6;
  };
}
