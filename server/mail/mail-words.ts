import type { Channel, Confidence } from '#shared/reports/report-content';

/**
 * The one catalogue of what mails say. The site's own texts are marked in its templates; a mail has
 * no browser to translate it, so its words stand here, by language.
 */
export const mailWords = {
  en: {
    caution: 'A report is an opinion on one piece. No report is not proof that a piece is genuine.',
    registry: 'Touchneedle, the counterfeit-report registry of the coin clubs',
    reset: {
      subject: 'Set a new password',
      body: (hours: number) => 'Somebody, probably you, asked to set a new password for this '
        + `address. The link is good for ${plural(hours, 'hour')} and can be used once.`,
      button: 'Set a new password',
      ignore: 'If it was not you, nothing happens as long as nobody opens the link.',
    },
    registration: {
      subject: 'Confirm your address',
      body: (hours: number) => 'Somebody, probably you, asked for an account at Touchneedle with '
        + `this address. The link is good for ${plural(hours, 'hour')} and can be used once.`,
      button: 'Choose a password',
      ignore: 'If it was not you, do nothing: there is no account without it.',
    },
    invitation: {
      subject: (club: string) => `${club} invites you`,
      body: (club: string, roles: string) => `${club} invites you to the registry as ${roles}. `
        + 'The link is good for two weeks and can be used once.',
      button: 'Accept',
      ignore: 'If you do not know the club, do nothing.',
    },
    notice: {
      report_published: { subject: (number: string) => `Published: counterfeit report ${number}`,
        body: 'A moderator published your report.' },
      report_made_public: { subject: (number: string) =>
        `Now public: counterfeit report ${number}`,
        body: 'A second moderator, of another club, agreed: your report is public now.' },
      report_returned: { subject: (number: string) => `Changes asked: report ${number}`,
        body: 'A moderator read your report and asks for changes. Nothing is lost: open it, '
          + 'change it, and send it again.' },
      report_declined: { subject: (number: string) => `Declined: report ${number}`,
        body: 'A moderator declined your report.' },
      report_unresolved: { subject: (number: string) => `Cannot be told: report ${number}`,
        body: 'A moderator could not tell from this evidence whether the piece is false.' },
      report_filed: { subject: (number: string) => `Filed: report ${number}`,
        body: 'Your report is filed and waits for a moderator.' },
      report_retracted: { subject: (number: string) => `Retracted: report ${number}`,
        body: 'Your report was retracted.' },
    },
    noticeReason: 'The moderator writes:',
    noticeOpen: 'Open your report',
    digest: {
      subject: (count: number) => count === 1 ? 'A new report for you'
        : `${count} new reports for you`,
      lead: (when: string) => `Your watches, ${when}.`,
      watch: (name: string) => `Watch: ${name}`,
      because: 'You get this because it fits',
      everything: 'you watch every report',
      counterfeitReport: 'Counterfeit report',
      stop: 'Stop these mails',
      change: 'Change when you get mail',
    },
    confidence: { suspected: 'suspected', probable: 'probable', confirmed: 'confirmed' } satisfies
      Record<Confidence, string>,
    channel: {
      online_marketplace: 'online marketplace', auction: 'auction', coin_show: 'coin show',
      shop: 'shop', flea_market: 'flea market', private_sale: 'private sale',
      inherited_lot: 'inherited lot', change: 'change', other: 'elsewhere',
    } satisfies Record<Channel, string>,
    role: { subscriber: 'subscriber', member: 'member', moderator: 'moderator',
      secretary: 'secretary' } as Readonly<Record<string, string>>,
  },
} as const;

export type MailWords = (typeof mailWords)['en'];

/** Words in the recipient's language; English where there are none. */
export function wordsFor(locale: string): MailWords {
  const languages: Readonly<Record<string, MailWords>> = mailWords;
  return languages[locale.split('-')[0] ?? 'en'] ?? mailWords.en;
}

function plural(count: number, unit: string): string {
  return `${count} ${unit}${count === 1 ? '' : 's'}`;
}
