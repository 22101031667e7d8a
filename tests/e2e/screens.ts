import type { World } from './world';

export type Reader = 'visitor' | 'member' | 'moderator' | 'registrar' | 'newcomer';

/** How a path's screen is brought into each of its states. */
export interface Screen {
  readonly as: Reader;
  readonly open: (world: World) => string;
  /** Asks the server for nothing but the session: it has no empty and no error state. */
  readonly asksNothing?: true;
  /** A link, a list or a form whose state without data is reached by an address or a reader. */
  readonly empty?: { readonly says: RegExp; readonly as?: Reader; readonly open?: string;
    /** Answers given in the server's place, by the end of the request's path. */
    readonly answers?: Readonly<Record<string, unknown>> };
}

const nothing = { items: [], next: null };
const noReports = { items: [], next: null, total: { count: 0, more: false }, facets: null,
  mended: null, number: null, numberMistyped: false };

/** By the paths of the client's routes. A path that is missing here fails the tests. */
export const screens: Readonly<Record<string, Screen>> = {
  '/': { as: 'visitor', open: () => '/', 
    empty: { says: /Nothing is published yet/, answers: { '/api/reports': noReports } } },
  '/reports': { as: 'visitor', open: () => '/reports',
    empty: { says: /No published report fits/, open: '/reports?text=zzyzx&exact=1' } },
  '/reports/:number': { as: 'visitor', open: ({ published }) => `/reports/${published}` },
  '/coin-types': { as: 'visitor', open: () => '/coin-types',
    empty: { says: /The catalogue has no such type/, open: '/coin-types?text=zzyzx' } },
  '/coin-types/:slug': { as: 'visitor', open: () => '/coin-types/quillhaven-crown' },
  '/my/reports': { as: 'member', open: () => '/my/reports',
    empty: { says: /You have filed nothing yet/, as: 'newcomer' } },
  '/my/reports/:number': { as: 'member', open: ({ returned }) => `/my/reports/${returned}` },
  '/my/reports/:number/change': { as: 'member',
    open: ({ returned }) => `/my/reports/${returned}/change` },
  '/file': { as: 'member', open: () => '/file',
    empty: { says: /No report is begun/, as: 'newcomer' } },
  '/file/:draftId': { as: 'member', open: ({ draft }) => `/file/${draft}` },
  '/review': { as: 'moderator', open: () => '/review', empty: { says: /Nothing waits/, answers: {
    '/api/review/queue': { ...nothing, waiting: 0, oldestFiledAt: null } } } },
  '/review/:number': { as: 'moderator', open: ({ waiting }) => `/review/${waiting}` },
  '/watches': { as: 'member', open: () => '/watches',
    empty: { says: /You watch nothing yet/, as: 'newcomer' } },
  '/clubs': { as: 'member', open: () => '/clubs',
    empty: { says: /No club yet/, answers: { '/api/clubs': { items: [] } } } },
  '/clubs/new': { as: 'registrar', open: () => '/clubs/new', asksNothing: true },
  '/clubs/:slug': { as: 'member', open: ({ club }) => `/clubs/${club}` },
  '/registry/mail': { as: 'registrar', open: () => '/registry/mail',
    empty: { says: /No mail in this state/, answers: { '/api/registry/mail': nothing } } },
  '/handbook': { as: 'visitor', open: () => '/handbook', asksNothing: true },
  '/handbook/tells': { as: 'visitor', open: () => '/handbook/tells',
    empty: { says: /No tell is in the catalogue yet/, answers: {
      '/api/tells': { methods: [], tells: [], genuineFeatures: [] } } } },
  '/handbook/cautions': { as: 'visitor', open: () => '/handbook/cautions', asksNothing: true },
  '/handbook/review': { as: 'visitor', open: () => '/handbook/review', asksNothing: true },
  '/handbook/roles': { as: 'visitor', open: () => '/handbook/roles', asksNothing: true },
  '/sign-in': { as: 'visitor', open: () => '/sign-in', asksNothing: true },
  '/register': { as: 'visitor', open: () => '/register', asksNothing: true },
  '/forgotten-password': { as: 'visitor', open: () => '/forgotten-password', asksNothing: true },
  '/password/:token': { as: 'visitor', open: ({ resetToken }) => `/password/${resetToken}` },
  '/setup/:token': { as: 'visitor', open: ({ setupToken }) => `/setup/${setupToken}` },
  '/account': { as: 'member', open: () => '/account', asksNothing: true },
  '/notices': { as: 'member', open: () => '/notices',
    empty: { says: /No notices yet/, as: 'newcomer' } },
  '/unsubscribe/:token': { as: 'visitor',
    open: (world) => `/unsubscribe/${world.unsubscribeToken}` },
  '/**': { as: 'visitor', open: () => '/no/such/page', asksNothing: true },
};

/** The address and the reader of a screen's state. */
export function visitOf(
  screen: Screen, state: 'data' | 'empty' | 'error', world: World,
): { readonly reader: Reader; readonly address: string } {
  return state === 'empty'
    ? { reader: screen.empty?.as ?? screen.as, address: screen.empty?.open ?? screen.open(world) }
    : { reader: screen.as, address: screen.open(world) };
}
