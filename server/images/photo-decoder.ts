import { fork, type ChildProcess } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { ProblemError } from '../errors';
import type { DecodedPhoto, DecodeReply, DecodeRequest } from './decoder-messages';

export interface PhotoDecoder {
  /**
   * Decodes in a child process. Throws ProblemError `photo_not_an_image` (415),
   * `photo_too_many_pixels` or `photo_damaged` (422), also where the time limit is overrun, and
   * `unavailable` (503) where too many wait.
   */
  decode(request: DecodeRequest): Promise<DecodedPhoto>;
  close(): void;
}

interface Waiting {
  readonly request: DecodeRequest;
  readonly done: (photo: DecodedPhoto) => void;
  readonly failed: (error: Error) => void;
}

const statusOf = { photo_not_an_image: 415, photo_too_many_pixels: 422, photo_damaged: 422 };

/** Processes live on for the next picture and end after a while without one. */
const idleMilliseconds = 30_000;

export function createPhotoDecoder(limits: {
  readonly processes: number; readonly waiting: number; readonly milliseconds: number;
} = { processes: 2, waiting: 60, milliseconds: 20_000 }): PhotoDecoder {
  const queue: Waiting[] = [];
  const idle = new Map<ChildProcess, NodeJS.Timeout>();
  const children = new Set<ChildProcess>();
  let busy = 0;

  return {
    decode: (request) => new Promise((done, failed) => {
      if (queue.length >= limits.waiting) {
        failed(new ProblemError(503, 'unavailable', { retryAfterSeconds: 10 }));
        return;
      }
      queue.push({ request, done, failed });
      startNext();
    }),
    close: () => {
      for (const child of children) child.kill('SIGKILL');
    },
  };

  function startNext(): void {
    if (busy >= limits.processes) return;
    const next = queue.shift();
    if (!next) return;
    busy += 1;
    run(next);
  }

  function run({ request, done, failed }: Waiting): void {
    const child = takeIdle() ?? start();
    const overrun = setTimeout(() => {
      child.kill('SIGKILL');
    }, limits.milliseconds);
    const onMessage = (reply: DecodeReply): void => {
      finish();
      rest(child);
      if (reply.ok) done(reply.photo);
      else failed(new ProblemError(statusOf[reply.refusal], reply.refusal));
      startNext();
    };
    const onExit = (): void => {
      finish();
      failed(new ProblemError(422, 'photo_damaged'));
      startNext();
    };
    const finish = (): void => {
      clearTimeout(overrun);
      child.off('message', onMessage).off('exit', onExit);
      busy -= 1;
    };
    child.on('message', onMessage).on('exit', onExit);
    child.ref();
    child.channel?.ref();
    child.send(request);
  }

  /** An idle process, like its channel, does not keep the server from ending. */
  function rest(child: ChildProcess): void {
    idle.set(child, setTimeout(() => child.kill(), idleMilliseconds).unref());
    child.unref();
    child.channel?.unref();
  }

  function takeIdle(): ChildProcess | undefined {
    for (const [child, timer] of idle) {
      clearTimeout(timer);
      idle.delete(child);
      if (child.connected) return child;
    }
    return undefined;
  }

  function start(): ChildProcess {
    const extension = import.meta.url.endsWith('.ts') ? 'ts' : 'js';
    const child = fork(fileURLToPath(new URL(`./decoder-process.${extension}`, import.meta.url)), {
      execArgv: extension === 'ts' ? ['--import', 'tsx'] : [],
      // Nothing of the server's secrets in a process that opens hostile files.
      env: { PATH: process.env['PATH'] ?? '', NODE_ENV: process.env['NODE_ENV'] ?? '' },
      stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
    });
    children.add(child);
    child.on('error', () => child.kill('SIGKILL'));
    child.on('exit', () => {
      children.delete(child);
      clearTimeout(idle.get(child));
      idle.delete(child);
    });
    return child;
  }
}
