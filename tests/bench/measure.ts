/** How long some work takes, in milliseconds. */
export async function timeMs(work: () => Promise<unknown>): Promise<number> {
  const start = performance.now();
  await work();
  return performance.now() - start;
}

/** The middle one, or the mean of the two in the middle. */
export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const upper = sorted[sorted.length >> 1];
  const lower = sorted[(sorted.length - 1) >> 1];
  if (upper === undefined || lower === undefined) throw new Error('Nothing was measured.');
  return (upper + lower) / 2;
}

/**
 * Measures each in turn, round by round and every other round backwards, so that what else the machine does meets
 * all of them alike. A first round warms up and does not count.
 *
 * @param works each answers the milliseconds that it took; what it does before and after is its own affair
 * @returns the median of each
 */
export async function alternate<Name extends string>(
  rounds: number,
  works: Readonly<Record<Name, () => Promise<number>>>,
): Promise<Record<Name, number>> {
  const names = Object.keys(works) as Name[];
  const taken = new Map<Name, number[]>(names.map((name) => [name, []]));
  for (let round = 0; round <= rounds; round += 1) {
    for (const name of round % 2 === 0 ? names : names.toReversed()) {
      const ms = await works[name]();
      if (round > 0) taken.get(name)?.push(ms);
    }
  }
  return Object.fromEntries(names.map((name) => [name, median(taken.get(name) ?? [])])) as Record<
    Name,
    number
  >;
}

/** '301 ms', '0.62 ms', '2.1 s'. */
export function formatMs(ms: number): string {
  if (ms >= 10_000) return `${(ms / 1_000).toFixed(1)} s`;
  return `${ms >= 10 ? ms.toFixed(0) : ms.toFixed(2)} ms`;
}

/** 'page 1.2 ms against query 0.8 ms, median of 5'. */
export function formatAgainst(
  ours: string,
  oursMs: number,
  theirs: string,
  theirsMs: number,
  rounds: number,
): string {
  return `${ours} ${formatMs(oursMs)} against ${theirs} ${formatMs(theirsMs)}, median of ${rounds}`;
}
