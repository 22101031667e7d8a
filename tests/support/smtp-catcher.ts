import type { AddressInfo, Socket } from 'node:net';
import { simpleParser, type ParsedMail } from 'mailparser';
import { SMTPServer } from 'smtp-server';

/** What the catcher does with a mail to one address. */
export type SmtpBehaviour =
  | { readonly kind: 'accept' }
  /** Answers RCPT or the end of the body with this code. */
  | { readonly kind: 'refuse'; readonly at: 'recipient' | 'body'; readonly code: number }
  | { readonly kind: 'drop_at_recipient' }
  /** Reads the whole body, keeps it, and breaks off without an answer. */
  | { readonly kind: 'drop_after_body' }
  /** Reads the whole body, keeps it, and answers only after `release`. */
  | { readonly kind: 'hang' };

export interface CaughtMail {
  readonly messageId: string;
  readonly to: string;
  readonly raw: string;
  readonly parsed: ParsedMail;
}

/** An SMTP server that keeps every body that reached it and fails as it is told to. */
export class SmtpCatcher {
  /** Every body read to its end, answered or not: what a recipient may have got. */
  readonly caught: CaughtMail[] = [];
  /** How often a recipient was named, whatever came of it. */
  readonly named: string[] = [];
  private readonly sockets = new Map<string, Socket>();
  private readonly held: (() => void)[] = [];
  private readonly waiting = new Set<() => void>();
  private behave: (address: string, nth: number) => SmtpBehaviour = () => ({ kind: 'accept' });
  private port = 0;
  private server = this.createServer();

  /** `nth` counts the tries for the address, from 1. */
  behaveAs(behave: (address: string, nth: number) => SmtpBehaviour): void {
    this.behave = behave;
  }

  async start(): Promise<this> {
    await new Promise<void>((resolve, reject) => {
      this.server.on('error', (error) => {
        // Broken connections are what it is for.
        if (this.port === 0) reject(error);
      });
      this.server.server.on('connection', (socket) => {
        const key = `${socket.remoteAddress}:${socket.remotePort}`;
        this.sockets.set(key, socket);
        socket.on('error', () => undefined).on('close', () => this.sockets.delete(key));
      });
      this.server.listen(this.port, '127.0.0.1', () => resolve());
    });
    this.port = (this.server.server.address() as AddressInfo).port;
    return this;
  }

  get url(): string {
    return `smtp://127.0.0.1:${this.port}`;
  }

  mailsTo(address: string): CaughtMail[] {
    return this.caught.filter((mail) => mail.to === address);
  }

  /** Lets every exchange that hangs come to its answer. */
  release(): void {
    this.held.splice(0).forEach((answer) => answer());
  }

  /** Resolves once `isMet` holds; looked at again with every recipient and body. */
  until(isMet: () => boolean): Promise<void> {
    return new Promise((resolve) => {
      const look = (): void => {
        if (!isMet()) return;
        this.waiting.delete(look);
        resolve();
      };
      this.waiting.add(look);
      look();
    });
  }

  /** Breaks every connection and refuses new ones until `start`. */
  async stop(): Promise<void> {
    this.sockets.forEach((socket) => socket.destroy());
    await new Promise<void>((resolve) => this.server.close(() => resolve()));
    this.release();
    this.server = this.createServer();
  }

  private createServer(): SMTPServer {
    return new SMTPServer({
      authOptional: true,
      disabledCommands: ['STARTTLS'],
      closeTimeout: 100,
      onRcptTo: ({ address }, session, done) => {
        this.named.push(address);
        this.look();
        const behaviour = this.behaviourFor(address);
        if (behaviour.kind === 'drop_at_recipient') this.drop(session);
        else if (behaviour.kind === 'refuse' && behaviour.at === 'recipient') {
          done(answerOf(behaviour.code));
        } else done();
      },
      onData: (stream, session, done) => {
        const chunks: Buffer[] = [];
        stream.on('data', (chunk: Buffer) => chunks.push(chunk));
        stream.on('end', () => {
          const raw = Buffer.concat(chunks);
          const to = session.envelope.rcptTo[0]?.address ?? '';
          const behaviour = this.behaviourFor(to);
          void simpleParser(raw).then((parsed) => {
            if (behaviour.kind === 'refuse') {
              done(answerOf(behaviour.code));
              return;
            }
            this.caught.push({ to, parsed, raw: raw.toString('latin1'),
              messageId: parsed.messageId ?? '' });
            if (behaviour.kind === 'drop_after_body') this.drop(session);
            else if (behaviour.kind === 'hang') this.held.push(() => done());
            else done();
            this.look();
          });
        });
      },
    });
  }

  private behaviourFor(address: string): SmtpBehaviour {
    return this.behave(address, this.named.filter((each) => each === address).length);
  }

  private drop(session: { readonly remoteAddress: string; readonly remotePort: number }): void {
    this.sockets.get(`${session.remoteAddress}:${session.remotePort}`)?.destroy();
  }

  private look(): void {
    this.waiting.forEach((look) => look());
  }
}

function answerOf(code: number): Error {
  return Object.assign(new Error('as it was told to'), { responseCode: code });
}
