/**
 * Who gets what from which route, written by hand. A route that is missing here fails, and so does
 * a row without a route. Writes are sent with a body that validation refuses (422) or with an id
 * that nobody has (404, or 204 where removing what is not there is no error): either proves that
 * the caller was let in, and nothing is disturbed; 401 and 403 prove that they were not.
 */
export const matrixRoles = ['visitor', 'subscriber', 'clubSubscriber', 'author', 'otherMember',
  'namedMember', 'moderator', 'otherModerator', 'secretary', 'registrar'] as const;
export type MatrixRole = (typeof matrixRoles)[number];

/** Objects that a row asks for: the author's report of an audience, published or filed only. */
export const matrixObjects = ['club', 'named_clubs', 'clubs', 'public', 'filed'] as const;
export type MatrixObject = (typeof matrixObjects)[number];

type Cells = readonly [number, number, number, number, number, number, number, number, number,
  number];

export interface MatrixRow {
  readonly route: string;
  readonly cells: Cells | Readonly<Record<MatrixObject, Cells>>;
}

//                        visitor      clubSubscriber  otherMember  moderator   secretary
//                              subscriber      author      namedMember otherModerator registrar
const anyone: Cells =         [200, 200, 200, 200, 200, 200, 200, 200, 200, 200];
const unknownToAll: Cells =   [404, 404, 404, 404, 404, 404, 404, 404, 404, 404];
const refusedInput: Cells =   [422, 422, 422, 422, 422, 422, 422, 422, 422, 422];
const signedInOk: Cells =     [401, 200, 200, 200, 200, 200, 200, 200, 200, 200];
const signedInInput: Cells =  [401, 422, 422, 422, 422, 422, 422, 422, 422, 422];
const signedInGone: Cells =   [401, 404, 404, 404, 404, 404, 404, 404, 404, 404];
const memberOk: Cells =       [401, 403, 403, 200, 200, 200, 200, 200, 200, 403];
const memberInput: Cells =    [401, 403, 403, 422, 422, 422, 422, 422, 422, 403];
const memberGone: Cells =     [401, 403, 403, 404, 404, 404, 404, 404, 404, 403];
const memberDone: Cells =     [401, 403, 403, 204, 204, 204, 204, 204, 204, 403];
const authorOnly: Cells =     [401, 404, 404, 200, 404, 404, 404, 404, 404, 404];
const ownPhotoOnly: Cells =   [401, 403, 403, 200, 404, 404, 404, 404, 404, 403];
const moderatorOk: Cells =    [401, 403, 403, 403, 403, 403, 200, 200, 403, 403];
const ownModerator: Cells =   [401, 403, 403, 403, 403, 403, 200, 404, 403, 403];
const moderatorInput: Cells = [401, 403, 403, 403, 403, 403, 422, 422, 403, 403];
const registrarOk: Cells =    [401, 403, 403, 403, 403, 403, 403, 403, 403, 200];
const registrarInput: Cells = [401, 403, 403, 403, 403, 403, 403, 403, 403, 422];
const managerInput: Cells =   [401, 403, 403, 403, 403, 403, 403, 403, 422, 422];
const managerGone: Cells =    [401, 403, 403, 403, 403, 403, 403, 403, 404, 404];

const clubReaders: Cells =    [404, 404, 200, 200, 404, 404, 200, 404, 200, 200];
const namedReaders: Cells =   [404, 404, 200, 200, 404, 200, 200, 404, 200, 200];
const clubsReaders: Cells =   [404, 404, 200, 200, 200, 200, 200, 200, 200, 200];
const filedReviewers: Cells = [404, 404, 404, 200, 404, 404, 200, 200, 404, 404];

/** Sight of what is published goes by the audience; what is only filed has no public page. */
const published = { club: clubReaders, named_clubs: namedReaders, clubs: clubsReaders,
  public: anyone };
const reviewed = { club: ownModerator, named_clubs: ownModerator, clubs: moderatorOk,
  public: moderatorOk, filed: moderatorOk };
const same = (cells: Cells): Record<MatrixObject, Cells> =>
  ({ club: cells, named_clubs: cells, clubs: cells, public: cells, filed: cells });

export const accessMatrix: readonly MatrixRow[] = [
  { route: 'GET /api/health', cells: anyone },
  { route: 'GET /api/openapi.json', cells: anyone },
  { route: 'GET /api/session', cells: anyone },
  { route: 'POST /api/session', cells: refusedInput },
  { route: 'DELETE /api/session',
    cells: [204, 204, 204, 204, 204, 204, 204, 204, 204, 204] },
  { route: 'DELETE /api/sessions',
    cells: [401, 204, 204, 204, 204, 204, 204, 204, 204, 204] },
  { route: 'POST /api/registrations', cells: refusedInput },
  { route: 'POST /api/password-resets', cells: refusedInput },
  { route: 'GET /api/account-links/:token', cells: unknownToAll },
  { route: 'POST /api/account-links/:token', cells: unknownToAll },
  { route: 'PATCH /api/account', cells: signedInInput },
  { route: 'PUT /api/account/password', cells: signedInInput },
  { route: 'GET /api/clubs', cells: signedInOk },
  { route: 'POST /api/clubs', cells: registrarInput },
  { route: 'GET /api/clubs/:slug', cells: signedInOk },
  { route: 'PATCH /api/clubs/:slug', cells: managerInput },
  { route: 'POST /api/clubs/:slug/invitations', cells: managerInput },
  { route: 'DELETE /api/clubs/:slug/invitations/:id', cells: managerGone },
  { route: 'PUT /api/clubs/:slug/members/:personId/roles', cells: managerGone },
  { route: 'GET /api/coin-types', cells: anyone },
  { route: 'GET /api/coin-types/:slug', cells: anyone },
  { route: 'GET /api/tells', cells: anyone },
  { route: 'POST /api/photos', cells: memberInput },
  { route: 'GET /api/photos/:id', cells: same(ownPhotoOnly) },
  { route: 'PUT /api/photos/:id/blurs', cells: memberInput },
  { route: 'DELETE /api/photos/:id', cells: memberGone },
  { route: 'GET /api/photos/:id/:file', cells: { ...published, filed: filedReviewers } },
  { route: 'GET /api/drafts', cells: memberOk },
  { route: 'GET /api/drafts/:id', cells: memberGone },
  { route: 'PUT /api/drafts/:id', cells: memberInput },
  { route: 'DELETE /api/drafts/:id', cells: memberDone },
  { route: 'GET /api/reports', cells: anyone },
  { route: 'GET /api/reports/suggestions', cells: anyone },
  { route: 'GET /api/reports/:number', cells: { ...published, filed: unknownToAll } },
  { route: 'POST /api/reports', cells: memberInput },
  { route: 'GET /api/my/reports', cells: signedInOk },
  { route: 'GET /api/my/reports/:number', cells: same(authorOnly) },
  { route: 'GET /api/my/reports/:number/content', cells: same(authorOnly) },
  { route: 'PUT /api/my/reports/:number/content', cells: memberInput },
  { route: 'POST /api/my/reports/:number/withdrawal', cells: signedInInput },
  { route: 'GET /api/review/queue', cells: moderatorOk },
  { route: 'GET /api/review/reports/:number', cells: reviewed },
  { route: 'POST /api/review/reports/:number/lease', cells: {
    // Decided reports can't be claimed (409); the one that is filed can, by one moderator.
    club: [401, 403, 403, 403, 403, 403, 409, 404, 403, 403],
    named_clubs: [401, 403, 403, 403, 403, 403, 409, 404, 403, 403],
    clubs: [401, 403, 403, 403, 403, 403, 409, 409, 403, 403],
    public: [401, 403, 403, 403, 403, 403, 409, 409, 403, 403],
    filed: [401, 403, 403, 403, 403, 403, 200, 409, 403, 403] } },
  { route: 'DELETE /api/review/reports/:number/lease', cells: {
    club: [401, 403, 403, 403, 403, 403, 204, 404, 403, 403],
    named_clubs: [401, 403, 403, 403, 403, 403, 204, 404, 403, 403],
    clubs: [401, 403, 403, 403, 403, 403, 204, 204, 403, 403],
    public: [401, 403, 403, 403, 403, 403, 204, 204, 403, 403],
    filed: [401, 403, 403, 403, 403, 403, 204, 204, 403, 403] } },
  { route: 'POST /api/review/reports/:number/decisions', cells: moderatorInput },
  { route: 'POST /api/review/reports/:number/conflict', cells: moderatorInput },
  { route: 'GET /api/watches', cells: signedInOk },
  { route: 'PUT /api/watches/:id', cells: signedInInput },
  { route: 'DELETE /api/watches/:id', cells: signedInGone },
  { route: 'POST /api/watches/preview', cells: signedInInput },
  { route: 'GET /api/unsubscribe/:token', cells: unknownToAll },
  { route: 'POST /api/unsubscribe/:token', cells: unknownToAll },
  { route: 'POST /unsubscribe/:token', cells: unknownToAll },
  { route: 'GET /api/notices', cells: signedInOk },
  { route: 'PUT /api/notices/:id/read', cells: signedInGone },
  { route: 'GET /api/registry/mail', cells: registrarOk },
  { route: 'POST /api/registry/mail/:id/settlement', cells: registrarInput },
];
