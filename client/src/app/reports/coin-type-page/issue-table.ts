import { IssueView } from '#shared/catalogue/coin-type-view';

export interface IssueCell {
  readonly mintMark: string;
  readonly state: IssueView['state'] | null;
  readonly knownCount: number | null;
  readonly note: string;
}

export interface IssueTable {
  readonly mintMarks: readonly string[];
  readonly rows: readonly { readonly year: number; readonly cells: readonly IssueCell[] }[];
}

/** Years down, mint marks across; a cell without an entry has the state null. */
export function issueTable(issues: readonly IssueView[]): IssueTable {
  const mintMarks = [...new Set(issues.map(({ mintMark }) => mintMark))].sort();
  const years = [...new Set(issues.map(({ year }) => year))].sort((one, other) => one - other);
  const byPlace = new Map(issues.map((issue) => [`${issue.year} ${issue.mintMark}`, issue]));
  return {
    mintMarks,
    rows: years.map((year) => ({
      year,
      cells: mintMarks.map((mintMark) => {
        const issue = byPlace.get(`${year} ${mintMark}`);
        return {
          mintMark,
          state: issue?.state ?? null,
          knownCount: issue?.knownCount ?? null,
          note: issue?.note ?? '',
        };
      }),
    })),
  };
}
