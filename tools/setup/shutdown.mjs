/** @type {(() => unknown)[]} */
const tasks = [];
/** @type {Promise<void> | null} */
let stopping = null;

/**
 * Has a task done when the script ends, by a signal or by itself; the last one given is done first.
 * @param {() => unknown} task may be asynchronous; a failure does not keep the others from running
 * @returns {() => void} takes the task back
 */
export function atShutdown(task) {
  tasks.push(task);
  return () => {
    const index = tasks.indexOf(task);
    if (index >= 0) {
      tasks.splice(index, 1);
    }
  };
}

/** @returns {boolean} whether the script is on its way out */
export function isShuttingDown() {
  return stopping !== null;
}

/** Does all tasks once, however often it is called. */
export function shutDown() {
  stopping ??= (async () => {
    for (let task = tasks.pop(); task; task = tasks.pop()) {
      try {
        await task();
      } catch (error) {
        process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`);
      }
    }
  })();
  return stopping;
}

/**
 * Ends the script tidily on Ctrl-C and on SIGTERM. npm passes a Ctrl-C on that the terminal has already sent,
 * so a repeated signal is no sign of impatience and changes nothing.
 * @param {(signal: string) => void} [announce] called once, before anything is stopped
 */
export function stopOnSignals(announce) {
  for (const [signal, code] of /** @type {const} */ ([
    ['SIGINT', 130],
    ['SIGTERM', 143],
    ['SIGHUP', 129],
  ])) {
    process.on(signal, () => {
      if (!stopping) {
        announce?.(signal);
        void shutDown().then(() => process.exit(code));
      }
    });
  }
}
