import {
  ChangeDetectionStrategy, Component, LOCALE_ID, computed, effect, inject, input,
} from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { RouterLink } from '@angular/router';
import { BehaviorSubject, combineLatest, switchMap } from 'rxjs';
import { CoinTypeView, IssueView, StandardValue } from '#shared/catalogue/coin-type-view';
import { ReportSearchAnswer } from '#shared/reports/report-view';

import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { Caution } from '../../ui/caution';
import { Crumb, PageHeader } from '../../ui/page-header';
import { PageTitle } from '../../ui/page-title';
import { countryName } from '../../ui/place-pipe';
import { ReportCard } from '../../ui/report-card';
import { metalWords, pieceKindWords } from '../../ui/report-words';
import { StateMessage } from '../../ui/state-message';
import { CatalogueApi } from '../catalogue-api';
import { ReportsApi } from '../reports-api';
import { sourceKindWords, standardQuantityWords } from '../standard-words';
import { IssueCell, issueTable } from './issue-table';

const reportsShown = 8;

/** A coin type: its standard with the source of each value, its dates, and its fakes on record. */
@Component({
  selector: 'tn-coin-type-page',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Caution, MatButton, PageHeader, ReportCard, RouterLink, StateMessage],
  host: { class: 'tn-page' },
  templateUrl: './coin-type-page.html',
  styleUrl: './coin-type-page.scss',
})
export class CoinTypePage {
  private readonly catalogue = inject(CatalogueApi);
  private readonly reportsApi = inject(ReportsApi);
  private readonly pageTitle = inject(PageTitle);
  private readonly locale = inject(LOCALE_ID);
  private readonly reload = new BehaviorSubject<void>(undefined);

  /** From the address. */
  readonly slug = input.required<string>();

  private readonly asked$ = combineLatest([toObservable(this.slug), this.reload]);
  protected readonly answer = toSignal(
    this.asked$.pipe(switchMap(([slug]) => loadState(this.catalogue.coinType(slug)))),
    { initialValue: { state: 'loading' } satisfies LoadState<CoinTypeView> },
  );
  protected readonly reports = toSignal(
    this.asked$.pipe(
      switchMap(([slug]) =>
        loadState(this.reportsApi.search({ coinType: [slug] }, { limit: reportsShown })),
      ),
    ),
    { initialValue: { state: 'loading' } satisfies LoadState<ReportSearchAnswer> },
  );
  protected readonly type = computed(() => {
    const answer = this.answer();
    return answer.state === 'ready' ? answer.data : null;
  });
  protected readonly problem = computed(() => {
    const answer = this.answer();
    return answer.state === 'failed' ? answer.problem : null;
  });
  protected readonly problemText = computed(() => textOf(this.answer()));
  protected readonly reportsProblemText = computed(() => textOf(this.reports()));
  protected readonly crumbs = computed<readonly Crumb[]>(() => [
    { label: $localize`Coin types`, link: '/coin-types' },
    { label: this.type()?.name ?? this.slug() },
  ]);
  protected readonly lead = computed(() => {
    const type = this.type();
    if (!type) return '';
    return [type.issuer, type.metal && metalWords(type.metal), pieceKindWords(type.kind)]
      .filter((part) => part)
      .join(' · ');
  });
  protected readonly standard = computed(() =>
    (this.type()?.standard ?? []).map((row) => ({
      ...row,
      name: standardQuantityWords(row.quantity),
      valueText: this.valueText(row),
      limitsText: this.limitsText(row),
      sourceKindText: sourceKindWords(row.sourceKind),
    })),
  );
  protected readonly issues = computed(() => issueTable(this.type()?.issues ?? []));
  /** Dates that are more than struck: each with its story, below the table. */
  protected readonly remarkable = computed(() =>
    (this.type()?.issues ?? []).filter(({ state, note }) => state !== 'struck' || note !== '')
      .map((issue) => ({ ...issue, stateText: issueStateWords(issue.state, issue.knownCount) })),
  );
  /** Countries of one status and one source share a line. */
  protected readonly legal = computed(() => {
    const lines = new Map<string, { status: string; source: string; countries: string[] }>();
    for (const { country, status, source, sourceKind } of this.type()?.legalStatus ?? []) {
      const from = `${source} · ${sourceKindWords(sourceKind)}`;
      const key = `${status} ${from}`;
      const words = legalStatusWords(status);
      const line = lines.get(key) ?? { status: words, source: from, countries: [] };
      line.countries.push(countryName(country, this.locale));
      lines.set(key, line);
    }
    return [...lines].map(([key, line]) => ({
      ...line,
      key,
      countries: line.countries.sort((one, other) => one.localeCompare(other)).join(', '),
    }));
  });
  protected readonly watchQuery = computed(() => ({ coinType: this.slug() }));

  constructor() {
    effect(() => {
      const type = this.type();
      if (type) this.pageTitle.nameScreen(type.name);
    });
  }

  protected cellWords(cell: IssueCell): string {
    return cell.state === null
      ? $localize`none on record`
      : issueStateWords(cell.state, cell.knownCount);
  }

  protected loadAgain(): void {
    this.reload.next();
  }

  private valueText(row: StandardValue): string {
    if (row.nominal === null) return row.words;
    const figure = `${this.figure(row.nominal)} ${unitWords(row.unit)}`.trim();
    return row.words ? `${figure} (${row.words})` : figure;
  }

  private limitsText({ low, high, unit }: StandardValue): string {
    if (low === null && high === null) return '';
    const words = unitWords(unit);
    if (low === null) return $localize`up to ${this.figure(high ?? 0)}:figure: ${words}:unit:`;
    if (high === null) return $localize`from ${this.figure(low)}:figure: ${words}:unit:`;
    return `${this.figure(low)}–${this.figure(high)} ${words}`.trim();
  }

  private figure(value: number): string {
    return value.toLocaleString(this.locale, { maximumFractionDigits: 5 });
  }
}

function unitWords(unit: string): string {
  return unit === '1' ? '' : unit;
}

function textOf(answer: LoadState<unknown>): string {
  return answer.state === 'failed' ? problemWords(answer.problem) : '';
}

function issueStateWords(state: IssueView['state'], knownCount: number | null): string {
  switch (state) {
    case 'struck':
      return $localize`struck`;
    case 'never_struck':
      return $localize`never struck`;
    case 'none_released':
      return $localize`struck, none released`;
    case 'few_known':
      return knownCount === null
        ? $localize`few known`
        : $localize`${knownCount}:count: known`;
    case 'proof_only':
      return $localize`proof only`;
  }
}

function legalStatusWords(status: string): string {
  switch (status) {
    case 'current':
      return $localize`current money`;
    case 'obsolete':
      return $localize`no longer current`;
    case 'redeemable':
      return $localize`no longer current, still redeemed`;
    case 'protected':
      return $localize`protected though not current`;
    case 'not_money':
      return $localize`not money`;
    default:
      return status.replaceAll('_', ' ');
  }
}
