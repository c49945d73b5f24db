import { ENDPOINTS, type Progress } from '@brakeven/contract';
import { type Response } from 'express';
import { type Api } from '../api';
import { isLast } from './progress-hub';

const HEARTBEAT_MS = 15_000;

/** `GET /progress/:progressId`: server-sent events until the work is done or the browser goes. */
export function mountProgress({ mount, progress }: Api): void {
  mount(ENDPOINTS.watchProgress, ({ context, params, response }) => {
    response.writeHead(200, {
      'Content-Type': 'text/event-stream',
      'Cache-Control': 'no-store, no-transform',
      'X-Accel-Buffering': 'no',
    });
    response.flushHeaders();
    const heartbeat = setInterval(() => response.write(': still here\n\n'), HEARTBEAT_MS);
    const stop = progress.subscribe(context.actor.userId ?? '', params.progressId, {
      onProgress: (state) => send(response, state),
      onEnd: () => response.end(),
    });
    response.once('close', () => {
      clearInterval(heartbeat);
      stop();
    });
  });
}

function send(response: Response, state: Progress): void {
  response.write(`data: ${JSON.stringify(state)}\n\n`);
  if (isLast(state)) response.end();
}
