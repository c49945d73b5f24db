/** A source of pseudo-random numbers that gives the same story on every machine (mulberry32). */
export interface Random {
  /** 0 ≤ x < 1. */
  next(): number;
  between(low: number, high: number): number;
  pick<T>(items: readonly T[]): T;
  chance(share: number): boolean;
}

/** @param seed any whole number; equal seeds give equal sequences */
export function createRandom(seed: number): Random {
  let state = seed >>> 0;
  const next = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let x = Math.imul(state ^ (state >>> 15), 1 | state);
    x = (x + Math.imul(x ^ (x >>> 7), 61 | x)) ^ x;
    return ((x ^ (x >>> 14)) >>> 0) / 4294967296;
  };
  return {
    next,
    between: (low, high) => low + next() * (high - low),
    pick: (items) => {
      const item = items[Math.floor(next() * items.length)];
      if (item === undefined) throw new Error('Nothing to pick from.');
      return item;
    },
    chance: (share) => next() < share,
  };
}
