/** What other features may do with links: invitations are links of a club. */
export { addAccountLink } from './accounts-repository';
