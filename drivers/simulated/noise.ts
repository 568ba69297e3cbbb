/** A number in [0, 1) that the three whole numbers determine, well spread (xmur3-style mixing, public domain). */
export function hashUniform(seed: number, a: number, b: number): number {
  let hash = (seed ^ 0x9e3779b9) >>> 0;
  for (const value of [a, b]) {
    hash = Math.imul(hash ^ (value >>> 0), 0x85ebca6b);
    hash = Math.imul(hash ^ (hash >>> 13), 0xc2b2ae35);
    hash ^= hash >>> 16;
  }
  return (hash >>> 0) / 2 ** 32;
}

/** A standard normal number that the three whole numbers determine (Box-Muller). */
export function hashNormal(seed: number, a: number, b: number): number {
  const radius = Math.sqrt(-2 * Math.log(1 - hashUniform(seed, a, 2 * b)));
  return radius * Math.cos(2 * Math.PI * hashUniform(seed, a, 2 * b + 1));
}
