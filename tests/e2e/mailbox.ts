import type { AddressInfo } from 'node:net';
import { simpleParser, type ParsedMail } from 'mailparser';
import { SMTPServer } from 'smtp-server';

/** An SMTP server that keeps what it is given. */
export class Mailbox {
  readonly mails: ParsedMail[] = [];
  private readonly server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    onData: (stream, _session, done) => {
      simpleParser(stream).then((mail) => {
        this.mails.push(mail);
        done();
      }, done);
    },
  });

  /** Its address, on a free port of this machine. */
  start(): Promise<string> {
    return new Promise((resolve, reject) => {
      this.server.on('error', reject);
      this.server.listen(0, '127.0.0.1', () => {
        resolve(`smtp://127.0.0.1:${(this.server.server.address() as AddressInfo).port}`);
      });
    });
  }

  mailsTo(address: string): ParsedMail[] {
    return this.mails.filter(({ to }) => [to ?? []].flat()
      .some(({ value }) => value.some((each) => each.address === address)));
  }

  stop(): Promise<void> {
    return new Promise((resolve) => this.server.close(resolve));
  }
}
