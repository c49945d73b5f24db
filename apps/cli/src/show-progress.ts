import { type Progress } from '@brakeven/contract';

/**
 * Shows progress on standard error: at a terminal one line that is written over, elsewhere a line for each stage.
 * Call `end` before anything else is written.
 */
export function showProgress(): { onProgress: (progress: Progress) => void; end: () => void } {
  const isTerminal = process.stderr.isTTY;
  let shown = '';
  return {
    onProgress: ({ message, done, total }) => {
      const share = total && total > 0 ? ` ${Math.min(100, Math.floor((done / total) * 100))} %` : '';
      const line = isTerminal ? `${message}${share}` : `${message} …`;
      if (line === shown) return;
      shown = line;
      process.stderr.write(isTerminal ? `\r\u001b[K${line}` : `${line}\n`);
    },
    end: () => {
      if (isTerminal && shown) process.stderr.write('\r\u001b[K');
      shown = '';
    },
  };
}
