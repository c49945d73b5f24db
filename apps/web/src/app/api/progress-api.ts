import { inject, Injectable, InjectionToken } from '@angular/core';
import { type Progress } from '@brakeven/contract';
import { Observable } from 'rxjs';

/** Opens a stream of server-sent events; a token, so that specs can hand in their own. */
export const OPEN_EVENT_SOURCE = new InjectionToken<(url: string) => EventSource>('OPEN_EVENT_SOURCE', {
  providedIn: 'root',
  factory: () => (url) => new EventSource(url),
});

const LAST_STAGES: readonly Progress['stage'][] = ['done', 'failed'];

/** Progress of long work on the server. */
@Injectable({ providedIn: 'root' })
export class ProgressApi {
  private readonly open = inject(OPEN_EVENT_SOURCE);

  /**
   * Follows one piece of work until it is done, has failed, or nobody listens any more.
   * A broken stream only ends the news, never the work, so it completes instead of failing.
   */
  watch(progressId: string): Observable<Progress> {
    return new Observable<Progress>((subscriber) => {
      const source = this.open(`/api/progress/${progressId}`);
      const onMessage = (event: MessageEvent<string>) => {
        const progress = parseProgress(event.data);
        if (!progress) return;
        subscriber.next(progress);
        if (LAST_STAGES.includes(progress.stage)) subscriber.complete();
      };
      source.addEventListener('message', onMessage);
      source.addEventListener('progress', onMessage);
      source.addEventListener('error', () => {
        if (source.readyState === 2) subscriber.complete();
      });
      return () => source.close();
    });
  }
}

function parseProgress(data: string): Progress | null {
  try {
    const value = JSON.parse(data) as Partial<Progress>;
    return typeof value.stage === 'string' ? (value as Progress) : null;
  } catch {
    // A message that is no JSON (a keep-alive of a proxy, say) carries no news.
    return null;
  }
}
