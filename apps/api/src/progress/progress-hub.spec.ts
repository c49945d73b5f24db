import { type Progress } from '@brakeven/contract';
import { ProgressHub } from './progress-hub';

const state = (done: number, stage: Progress['stage'] = 'reading'): Progress => ({
  stage,
  done,
  total: 10,
  message: 'Reading',
});

function watch(hub: ProgressHub, userId: string, progressId: string) {
  const seen: number[] = [];
  let hasEnded = false;
  const stop = hub.subscribe(userId, progressId, {
    onProgress: ({ done }) => seen.push(done),
    onEnd: () => (hasEnded = true),
  });
  return { seen, stop, hasEnded: () => hasEnded };
}

describe('ProgressHub', () => {
  it('tells the latest state to who comes late, then all that follow', () => {
    const hub = new ProgressHub();
    hub.publish('pia', 'work', state(1));
    hub.publish('pia', 'work', state(2));
    const { seen } = watch(hub, 'pia', 'work');
    hub.publish('pia', 'work', state(3));
    expect(seen).toEqual([2, 3]);
  });

  it('keeps the work of one user from another who has guessed its id', () => {
    const hub = new ProgressHub();
    const { seen } = watch(hub, 'ola', 'work');
    hub.publish('pia', 'work', state(1));
    expect(seen).toEqual([]);
  });

  it('tells nothing more to who has stopped, and lets all others go at the end', () => {
    const hub = new ProgressHub();
    const [gone, here] = [watch(hub, 'pia', 'work'), watch(hub, 'pia', 'work')];
    gone.stop();
    hub.publish('pia', 'work', state(1));
    hub.end();
    expect([gone.seen, gone.hasEnded()]).toEqual([[], false]);
    expect([here.seen, here.hasEnded()]).toEqual([[1], true]);
  });

  it('forgets the oldest work that nobody watches, not one that somebody does', () => {
    const hub = new ProgressHub(2);
    const watched = watch(hub, 'pia', 'watched');
    hub.publish('pia', 'old', state(1));
    hub.publish('pia', 'new', state(2));
    hub.publish('pia', 'watched', state(3));
    expect(watched.seen).toEqual([3]);
    expect(watch(hub, 'pia', 'new').seen).toEqual([2]);
  });
});
