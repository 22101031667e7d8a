/** A page of a list, cut by key: `next` is handed back as `after`; null on the last page. */
export interface Page<Item> {
  readonly items: readonly Item[];
  readonly next: string | null;
}
