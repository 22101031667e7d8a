import type { Readable } from 'node:stream';
import nodemailer from 'nodemailer';
import { mailsAtOnce, type DeliveryOutcome } from './mail-ledger';

export interface ComposedMail {
  readonly to: string;
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly headers: Readonly<Record<string, string>>;
}

export interface MailTransport {
  deliver(mail: ComposedMail, messageId: string): Promise<DeliveryOutcome>;
  close(): void;
}

/**
 * SMTP with an outcome that can be trusted. A dropped connection looks the same to nodemailer
 * before and after the body went; whether the body's stream was read tells the two apart.
 */
export function createMailTransport(smtpUrl: string, from: string): MailTransport {
  const bodies = new Map<string, Readable>();
  const transport = nodemailer.createTransport({
    // A connection for each mail of a batch, so that none waits out its claim behind others; and
    // one try a claim: whoever tries again must ask first whether the recipient may still read it.
    url: smtpUrl, pool: true, maxConnections: mailsAtOnce, maxMessages: 1000, maxRequeues: 0,
    connectionTimeout: 5_000, greetingTimeout: 5_000, socketTimeout: 20_000,
  });
  transport.use('stream', (mail, done) => {
    const { message } = mail;
    const create = message.createReadStream.bind(message);
    const messageId = String(mail.data.messageId);
    message.createReadStream = (...values: Parameters<typeof create>) => {
      const stream = create(...values);
      bodies.set(messageId, stream);
      return stream;
    };
    done();
  });
  return {
    async deliver(mail, messageId) {
      try {
        const info = await transport.sendMail({
          from, to: mail.to, subject: mail.subject, text: mail.text, html: mail.html, messageId,
          headers: { 'Auto-Submitted': 'auto-generated', ...mail.headers },
          disableUrlAccess: true, disableFileAccess: true,
        });
        return { kind: 'sent', answer: info.response };
      } catch (error) {
        return outcomeOf(error, bodies.get(messageId));
      } finally {
        bodies.delete(messageId);
      }
    },
    close: () => transport.close(),
  };
}

function outcomeOf(error: unknown, body: Readable | undefined): DeliveryOutcome {
  const { responseCode, message } = error as { responseCode?: number; message?: string };
  const answer = message ?? 'no answer';
  if (responseCode !== undefined) {
    return { kind: responseCode >= 500 ? 'refused' : 'retry', answer };
  }
  return { kind: body?.readableDidRead ? 'uncertain' : 'retry', answer };
}
