import type { Config } from '../config';
import { escapeHtml, layOutMail } from './mail-layout';
import type { MailComposer } from './mail-sender';
import { wordsFor, type MailWords } from './mail-words';

/** Makes the secret of a mailed link out of its id; see the accounts. */
export type LinkToken = (linkId: string) => string;

/** Composers of the mails that carry a link good once, and of notices to a reporter. */
export function createAccountMailComposers(
  config: Config, linkToken: LinkToken,
): Readonly<Record<'reset' | 'registration' | 'invitation' | 'notice', MailComposer>> {
  const base = config.baseUrl.origin;

  const link = (kind: 'reset' | 'registration'): MailComposer => async (trx, mail) => {
    if (!await isLinkGood(trx, mail.parameters)) return undefined;
    const words = wordsFor('en');
    const hours = Number(mail.parameters['hoursValid']);
    return write(words, mail.address, words[kind].subject, [words[kind].body(hours)],
      { label: words[kind].button, address: addressOf(mail.parameters) }, words[kind].ignore);
  };

  return {
    reset: link('reset'),
    registration: link('registration'),
    invitation: async (trx, mail) => {
      if (!await isLinkGood(trx, mail.parameters)) return undefined;
      const club = await trx('club').select('name')
        .where({ id: String(mail.parameters['clubId']) }).first();
      if (!club) return undefined;
      const words = wordsFor('en');
      const roles = [mail.parameters['roles']].flat()
        .map((role) => words.role[String(role)] ?? String(role)).join(', ');
      return write(words, mail.address, words.invitation.subject(club.name),
        [words.invitation.body(club.name, roles)],
        { label: words.invitation.button, address: addressOf(mail.parameters) },
        words.invitation.ignore);
    },
    notice: async (trx, mail) => {
      const person = await trx('person').select('locale').where({ id: mail.person_id ?? '' })
        .whereNull('closed_at').first();
      if (!person) return undefined;
      const words = wordsFor(person.locale);
      const kind = String(mail.parameters['notice']);
      if (!isNotice(words, kind)) throw new Error(`no words for a notice of kind ${kind}`);
      const number = String(mail.parameters['number']);
      const reason = mail.parameters['reason'];
      return write(words, mail.address, words.notice[kind].subject(number),
        [words.notice[kind].body,
          ...(typeof reason === 'string' ? [`${words.noticeReason} ${reason}`] : [])],
        { label: words.noticeOpen, address: `${base}/my/reports/${number}` }, '');
    },
  };

  function addressOf(parameters: Readonly<Record<string, unknown>>): string {
    return `${base}/password/${linkToken(String(parameters['linkId']))}`;
  }

  function write(
    words: MailWords, to: string, subject: string, paragraphs: readonly string[],
    button: { label: string; address: string }, ignore: string,
  ) {
    return {
      to, subject, headers: {},
      text: `${paragraphs.join('\n\n')}\n\n${button.label}: ${button.address}\n\n${ignore}\n`,
      html: layOutMail({
        title: subject,
        bodyHtml: paragraphs.map((each) => `<p>${escapeHtml(each).replaceAll('\n', '<br>')}</p>`)
          .join('')
          + `<p><a href="${button.address}" style="display:inline-block;background:#2a6b5d;`
          + `color:#fff;padding:11px 18px;border-radius:10px;text-decoration:none;`
          + `font-weight:600">${escapeHtml(button.label)}</a></p>`
          + (ignore ? `<p style="color:#566067">${escapeHtml(ignore)}</p>` : ''),
        caution: words.caution,
        footerHtml: escapeHtml(words.registry),
      }),
    };
  }
}

async function isLinkGood(
  trx: Parameters<MailComposer>[0], parameters: Readonly<Record<string, unknown>>,
): Promise<boolean> {
  const row = await trx('account_link').select('id').where({ id: String(parameters['linkId']) })
    .whereNull('used_at').whereNull('withdrawn_at').where('expires_at', '>', trx.fn.now()).first();
  return row !== undefined;
}

function isNotice(words: MailWords, kind: string): kind is keyof MailWords['notice'] {
  return kind in words.notice;
}
