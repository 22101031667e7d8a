import { PlainError } from './plain-error.mjs';
import { stopCommands } from './run.mjs';

/**
 * What a script has running, and its end: by a signal, by a death among what it runs, or by a
 * failure on the way up. Whatever comes first decides the exit code; the rest is left alone.
 */
export class Stopping {
  /** @type {(() => Promise<void> | void)[]} */
  #undoings = [];
  /** @type {Promise<never> | undefined} */
  #end;

  /** @param {number} codeOnSignal */
  constructor(codeOnSignal) {
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) {
      process.on(signal, () => {
        if (this.#end) return;
        console.log('\nStopping …');
        void this.end(codeOnSignal);
      });
    }
    // npm that is killed outright passes no signal on; what it started would go on unseen.
    const parent = process.ppid;
    if (process.env.npm_lifecycle_event) {
      setInterval(() => {
        if (process.ppid !== parent) void this.end(codeOnSignal);
      }, 1_000).unref();
    }
  }

  get isUnderWay() {
    return this.#end !== undefined;
  }

  /** @param {() => Promise<void> | void} undoing run at the end, the last one first */
  undoWith(undoing) {
    this.#undoings.push(undoing);
  }

  /** To be called between two steps, so that a stop need not wait for the whole way up. */
  check() {
    if (this.isUnderWay) throw new PlainError('Stopped.');
  }

  /**
   * Runs the script's work; a failure in it is told and ends the script with code 1.
   * @param {() => Promise<void>} work
   * @param {() => void} [afterFailure] last words
   */
  async during(work, afterFailure) {
    this.work = work();
    try {
      await this.work;
    } catch (error) {
      if (this.isUnderWay) return;
      console.error(error instanceof PlainError ? `\n${error.message}\n` : error);
      afterFailure?.();
      await this.end(1);
    }
  }

  /** @param {number} code */
  end(code) {
    this.#end ??= this.#undoAll(code);
    return this.#end;
  }

  async #undoAll(code) {
    stopCommands();
    // A step under way may yet start something; once it is over, all that runs is known.
    await this.work?.catch(() => undefined);
    for (const undo of this.#undoings.reverse()) {
      try {
        await undo();
      } catch (error) {
        console.error(error);
      }
    }
    process.exit(code);
  }
}
