import { type Progress } from '@brakeven/contract';

/** Somebody who watches a piece of work. */
export interface Watcher {
  onProgress(progress: Progress): void;
  /** The program stops; nothing more will come. */
  onEnd(): void;
}

interface Work {
  latest: Progress | null;
  watchers: Set<Watcher>;
}

const LAST_STAGES: readonly Progress['stage'][] = ['done', 'failed'];

/** Whether nothing comes after this. */
export function isLast({ stage }: Progress): boolean {
  return LAST_STAGES.includes(stage);
}

/**
 * Passes on how far long work is, within this process. Work is known by the user and an id that the browser
 * chooses, so nobody can listen to somebody else's. Whoever comes late is told the latest state first.
 */
export class ProgressHub {
  private readonly works = new Map<string, Work>();

  /** @param worksMax how many pieces of work are remembered; the oldest that nobody watches is forgotten first */
  constructor(private readonly worksMax = 1_000) {}

  publish(userId: string, progressId: string, progress: Progress): void {
    const work = this.open(userId, progressId);
    work.latest = progress;
    for (const watcher of [...work.watchers]) watcher.onProgress(progress);
  }

  /** Tells the watcher the latest state, if there is one, and all that follow; returns how to stop it. */
  subscribe(userId: string, progressId: string, watcher: Watcher): () => void {
    const work = this.open(userId, progressId);
    work.watchers.add(watcher);
    if (work.latest) watcher.onProgress(work.latest);
    return () => work.watchers.delete(watcher);
  }

  /** Lets every watcher go, so that no open stream keeps the program from stopping. */
  end(): void {
    for (const { watchers } of this.works.values()) for (const watcher of [...watchers]) watcher.onEnd();
  }

  private open(userId: string, progressId: string): Work {
    const key = `${userId} ${progressId}`;
    const known = this.works.get(key);
    if (known) return known;
    this.forgetOldest();
    const work: Work = { latest: null, watchers: new Set() };
    this.works.set(key, work);
    return work;
  }

  private forgetOldest(): void {
    if (this.works.size < this.worksMax) return;
    for (const [key, work] of this.works) {
      if (work.watchers.size > 0) continue;
      this.works.delete(key);
      return;
    }
  }
}
