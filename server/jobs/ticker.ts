import type { Logger } from 'pino';

export interface Ticker {
  /** Runs the work soon; once more after the run under way, if there is one. */
  wake(): void;
  /** Resolves when the run under way has ended. */
  stop(): Promise<void>;
}

/** Runs `work` again and again, never twice at once. A failed run is logged and tried anew. */
export function startTicking(
  everyMilliseconds: number, logger: Logger, work: () => Promise<void>,
): Ticker {
  let stopped = false;
  let woken = false;
  let interrupt = (): void => undefined;

  const running = (async () => {
    while (!stopped) {
      woken = false;
      try {
        await work();
      } catch (error) {
        logger.error({ err: error }, 'a run of the ledger failed, the next one tries again');
      }
      if (!stopped && !woken) {
        await new Promise<void>((resolve) => {
          const timer = setTimeout(resolve, everyMilliseconds);
          interrupt = () => { clearTimeout(timer); resolve(); };
        });
      }
    }
  })();

  return {
    wake() { woken = true; interrupt(); },
    stop() { stopped = true; interrupt(); return running; },
  };
}
