/** `GET` and `POST /api/unsubscribe/:token`: what the link of a mail would stop, or has. */
export interface UnsubscribeView {
  readonly watches: readonly { readonly name: string }[];
  /** True where none of the watches sends mail any more. */
  readonly stopped: boolean;
}
