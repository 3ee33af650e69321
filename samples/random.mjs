/**
 * A small seeded generator, so that the samples have the same bytes everywhere: 32-bit xorshift
 * (Marsaglia 2003, Journal of Statistical Software 8(14)), good enough for sample data and nothing else.
 */
export function random(seed) {
  let state = seed >>> 0 || 1;
  const uniform = () => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return (state >>> 0) / 4294967296;
  };
  for (let i = 0; i < 20; i++) uniform();
  /** Sum of twelve uniforms less six: near enough to normal, with no tail beyond 6. */
  const normal = () => {
    let sum = -6;
    for (let i = 0; i < 12; i++) sum += uniform();
    return sum;
  };
  return { uniform, normal, pick: (list) => list[Math.floor(uniform() * list.length)] };
}
