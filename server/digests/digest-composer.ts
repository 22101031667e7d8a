import type { MatchReason } from '#shared/watches/watch-filter';
import type { ReportCard } from '#shared/reports/report-view';
import { photoAddress } from '#shared/reports/photo';
import type { Config } from '../config';
import { continueAs, type Transaction } from '../db/database';
import type { ClaimableMail } from '../mail/mail-ledger';
import { escapeHtml, layOutMail } from '../mail/mail-layout';
import type { MailComposer } from '../mail/mail-sender';
import type { ComposedMail } from '../mail/mail-transport';
import { wordsFor, type MailWords } from '../mail/mail-words';
import { unsubscribeToken } from '../watches/unsubscribe-token';

interface WatchReasons {
  readonly watchId: string;
  readonly watch: string;
  readonly reasons: readonly MatchReason[];
}

interface DigestItem {
  readonly report_id: string;
  readonly reasons: readonly WatchReasons[];
  readonly card: ReportCard;
}

export interface DigestNeeds {
  /** Cards of those reports that the actor of `trx` may read now, by report id. */
  findCards(trx: Transaction, reportIds: readonly string[]): Promise<Map<string, ReportCard>>;
  /** Names of values of filters, such as a tell's, as the actor may read them. */
  nameValues(trx: Transaction, reasons: readonly MatchReason[]): Promise<Map<string, string>>;
  /** Which of the reports hold which of the words for the actor, as `report-id words`. */
  findFittingWords(
    trx: Transaction, reportIds: readonly string[], texts: readonly string[],
  ): Promise<Set<string>>;
}

/** Writes a digest as its recipient may read it now; what they may no longer see is left out. */
export function createDigestComposer(config: Config, needs: DigestNeeds): MailComposer {
  return async (trx, mail) => {
    if (!mail.person_id) return undefined;
    const person = await trx('person').select('locale', 'time_zone')
      .where({ id: mail.person_id }).whereNull('closed_at').first();
    if (!person) return undefined;
    const frozen = await trx('mail_item').select('report_id', 'reasons')
      .where({ mail_id: mail.id }).orderBy('position');
    const wanted = await liveWatches(trx, mail.person_id);
    await continueAs(trx, { kind: 'person', id: mail.person_id });
    const cards = await needs.findCards(trx, frozen.map((item) => item.report_id));
    const words = await needs.findFittingWords(trx, [...cards.keys()],
      frozen.flatMap((item) => textsOf(item.reasons)));
    const items: DigestItem[] = frozen.flatMap((item) => {
      const card = cards.get(item.report_id);
      const reasons = card ? item.reasons.filter(({ watchId }: WatchReasons) => wanted.has(watchId))
        .flatMap((each: WatchReasons) => stillKnown(each, item.report_id, card, words)) : [];
      return card && reasons.length ? [{ report_id: item.report_id, reasons, card }] : [];
    });
    if (!items.length) return undefined;
    const names = await needs.nameValues(trx, items.flatMap((item) =>
      item.reasons.flatMap((each) => each.reasons)));
    return writeDigest(config, mail, items, names, person);
  };
}

const textsOf = (watches: readonly WatchReasons[]): string[] => watches.flatMap(({ reasons }) =>
  reasons.filter(({ kind }) => kind === 'text').map(({ value }) => value));

/**
 * The reasons as far as the recipient may know them now: whoever left their club since the match
 * must not learn from a mail which tells or words of the account the clubs know.
 */
function stillKnown(
  watch: WatchReasons, reportId: string, card: ReportCard, words: ReadonlySet<string>,
): WatchReasons[] {
  const isKnown = ({ kind, value }: MatchReason): boolean =>
    kind === 'tell' ? card.tells.some(({ id }) => id === value)
      : kind !== 'text' || words.has(`${reportId} ${value}`);
  const known = watch.reasons.filter(isKnown);
  const isLost = watch.reasons.some(({ kind }) => !known.some((reason) => reason.kind === kind));
  return isLost ? [] : [{ ...watch, reasons: known }];
}

async function liveWatches(trx: Transaction, personId: string): Promise<Set<string>> {
  const rows = await trx('watch').select('id').where({ person_id: personId })
    .whereNull('deleted_at').whereRaw('(paused_until is null or paused_until <= now())');
  return new Set(rows.map(({ id }) => id));
}

function writeDigest(
  config: Config, mail: ClaimableMail, items: readonly DigestItem[],
  names: ReadonlyMap<string, string>, person: { locale: string; time_zone: string },
): ComposedMail {
  const words = wordsFor(person.locale);
  const base = config.baseUrl.origin;
  const token = unsubscribeToken(mail.person_id ?? '', config.mailTokenKey);
  const stopAddress = `${base}/unsubscribe/${token}`;
  const subject = words.digest.subject(items.length);
  const when = new Intl.DateTimeFormat(person.locale, { dateStyle: 'full', timeStyle: 'short',
    timeZone: person.time_zone }).format(new Date(String(mail.parameters['due'])));
  const lead = words.digest.lead(`${when} (${person.time_zone})`);
  const groups = groupByWatch(items);
  const html = [...groups].map(([watch, group]) =>
    `<h2 style="font:600 19px Georgia,serif;margin:22px 0 8px">${escapeHtml(
      words.digest.watch(watch))}</h2>`
    + group.map(({ item, reasons }) => itemHtml(item, reasons, words, names, base)).join(''))
    .join('');
  const text = [...groups].map(([watch, group]) => `${words.digest.watch(watch)}\n\n`
    + group.map(({ item, reasons }) => itemText(item, reasons, words, names, base)).join('\n\n'))
    .join('\n\n');
  return {
    to: mail.address,
    subject,
    text: `${lead}\n\n${text}\n\n${words.caution}\n\n${words.digest.stop}: ${stopAddress}\n`
      + `${words.digest.change}: ${base}/watches\n`,
    html: layOutMail({
      title: subject,
      bodyHtml: `<p style="margin:0">${escapeHtml(lead)}</p>${html}`,
      caution: words.caution,
      footerHtml: `<a href="${stopAddress}" style="color:inherit">${escapeHtml(words.digest.stop)}`
        + `</a> · <a href="${base}/watches" style="color:inherit">${
          escapeHtml(words.digest.change)}</a><br>${escapeHtml(words.registry)}`,
    }),
    headers: {
      'List-Id': `Touchneedle digests <digests.${config.baseUrl.hostname}>`,
      'List-Unsubscribe': `<${stopAddress}>`,
      'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click',
    },
  };
}

/** Each report once, under the first watch that it fits. */
function groupByWatch(items: readonly DigestItem[]) {
  const groups = new Map<string, { item: DigestItem; reasons: readonly MatchReason[] }[]>();
  for (const item of items) {
    const [first] = item.reasons;
    if (!first) continue;
    const group = groups.get(first.watch) ?? [];
    group.push({ item, reasons: first.reasons });
    groups.set(first.watch, group);
  }
  return groups;
}

function factsOf(card: ReportCard, words: MailWords): string {
  return `${words.confidence[card.confidence]} · ${words.digest.counterfeitReport} ${card.number}`
    + ` · ${words.channel[card.channel]}`;
}

function because(
  reasons: readonly MatchReason[], words: MailWords, names: ReadonlyMap<string, string>,
): readonly string[] {
  return reasons.map((reason) => reason.kind === 'all' ? words.digest.everything
    : reason.kind === 'text' ? `“${reason.value}”`
      : names.get(`${reason.kind} ${reason.value}`) ?? reason.value.replaceAll('_', ' '));
}

function itemText(
  { card }: DigestItem, reasons: readonly MatchReason[], words: MailWords,
  names: ReadonlyMap<string, string>, base: string,
): string {
  return `${card.title}\n${factsOf(card, words)}\n${words.digest.because}: ${
    because(reasons, words, names).join(', ')}.\n${base}/reports/${card.number}`;
}

function itemHtml(
  { card }: DigestItem, reasons: readonly MatchReason[], words: MailWords,
  names: ReadonlyMap<string, string>, base: string,
): string {
  const address = `${base}/reports/${card.number}`;
  const photo = card.audience === 'public' ? card.photos[0] : undefined;
  const picture = photo ? `<td width="92" valign="top" style="padding:4px 16px 12px 0">
<img src="${base}${photoAddress(photo.id, 'small', 'jpeg')}" width="76" height="${
  Math.round(76 * photo.height / photo.width)}" alt="" style="border-radius:12px;display:block">
</td>` : '';
  return `<table role="presentation" width="100%" cellpadding="0" cellspacing="0"><tr>${picture}
<td valign="top" style="padding:0 0 16px">
<a href="${address}" style="font:600 18px Georgia,serif;color:#23282c">${
  escapeHtml(card.title)}</a><br>
<span style="color:#566067">${escapeHtml(factsOf(card, words))}</span><br>
${escapeHtml(words.digest.because)}: <strong>${
  because(reasons, words, names).map(escapeHtml).join('</strong>, <strong>')}</strong>.
</td></tr></table>`;
}
