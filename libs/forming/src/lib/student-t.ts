/**
 * Share of Student's t distribution between −t and t, for whole degrees of freedom.
 * Source: Abramowitz and Stegun, Handbook of Mathematical Functions, 26.7.3 and 26.7.4.
 */
export function studentShareWithin(t: number, freedom: number): number {
  const angle = Math.atan(t / Math.sqrt(freedom));
  const cosine = Math.cos(angle);
  const isOdd = freedom % 2 === 1;
  let term = isOdd ? cosine : 1;
  let total = freedom === 1 ? 0 : term;
  for (let power = isOdd ? 3 : 2; power <= freedom - 2; power += 2) {
    term *= (cosine ** 2 * (power - 1)) / power;
    total += term;
  }
  return isOdd ? (2 / Math.PI) * (angle + Math.sin(angle) * total) : Math.sin(angle) * total;
}

/** The t that holds a `share` (0 to 1) of the distribution between −t and t. */
export function studentLimit(share: number, freedom: number): number {
  let [low, high] = [0, 1];
  while (studentShareWithin(high, freedom) < share && high < 1e12) high *= 2;
  for (let step = 0; step < 100; step += 1) {
    const middle = (low + high) / 2;
    if (studentShareWithin(middle, freedom) < share) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
