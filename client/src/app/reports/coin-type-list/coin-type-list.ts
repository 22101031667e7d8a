import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { NonNullableFormBuilder, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelectModule } from '@angular/material/select';
import { ActivatedRoute, Router, RouterLink } from '@angular/router';
import { BehaviorSubject, combineLatest, map, switchMap } from 'rxjs';
import { CoinTypeSummary } from '#shared/catalogue/coin-type-view';
import { Page } from '#shared/paging';
import { metals, pieceKinds } from '#shared/reports/report-content';

import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { Caution } from '../../ui/caution';
import { PageHeader } from '../../ui/page-header';
import { Paging } from '../../ui/paging';
import { metalWords, pieceKindWords } from '../../ui/report-words';
import { StateMessage } from '../../ui/state-message';
import { CatalogueApi, CoinTypeQuery } from '../catalogue-api';

/** The catalogue: every coin type with the figures to measure it by. */
@Component({
  selector: 'tn-coin-type-list',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    Caution, MatButton, MatFormFieldModule, MatInput, MatSelectModule, PageHeader, Paging,
    ReactiveFormsModule, RouterLink, StateMessage,
  ],
  host: { class: 'tn-page' },
  templateUrl: './coin-type-list.html',
  styleUrl: './coin-type-list.scss',
})
export class CoinTypeList {
  private readonly api = inject(CatalogueApi);
  private readonly router = inject(Router);
  private readonly reload = new BehaviorSubject<void>(undefined);

  private readonly query$ = inject(ActivatedRoute).queryParamMap.pipe(
    map((params) => ({
      text: params.get('text')?.trim() ?? '',
      metal: params.get('metal') ?? '',
      kind: params.get('kind') ?? '',
      after: params.get('after') ?? '',
    })),
  );
  protected readonly query = toSignal(this.query$, {
    initialValue: { text: '', metal: '', kind: '', after: '' },
  });
  protected readonly answer = toSignal(
    combineLatest([this.query$, this.reload]).pipe(
      switchMap(([query]) => loadState(this.api.coinTypes(query))),
    ),
    { initialValue: { state: 'loading' } satisfies LoadState<Page<CoinTypeSummary>> },
  );
  protected readonly problem = computed(() => {
    const answer = this.answer();
    return answer.state === 'failed' ? answer.problem : null;
  });
  protected readonly problemText = computed(() => {
    const problem = this.problem();
    return problem ? problemWords(problem) : '';
  });
  protected readonly rows = computed(() => {
    const answer = this.answer();
    if (answer.state !== 'ready') return [];
    return answer.data.items.map((type) => ({
      ...type,
      kindText: pieceKindWords(type.kind),
      metalText: type.metal ? metalWords(type.metal) : '',
      yearsText: type.years ? yearsWords(type.years) : '',
    }));
  });
  protected readonly metalOptions = metals.map((value) => ({ value, label: metalWords(value) }));
  protected readonly kindOptions = pieceKinds.map((value) => ({
    value,
    label: pieceKindWords(value),
  }));
  protected readonly form = inject(NonNullableFormBuilder).group({ text: '', metal: '', kind: '' });

  constructor() {
    this.query$.pipe(takeUntilDestroyed()).subscribe(({ text, metal, kind }) => {
      this.form.setValue({ text, metal, kind }, { emitEvent: false });
    });
  }

  protected search(): void {
    const { text, metal, kind } = this.form.getRawValue();
    const query: CoinTypeQuery = { text: text.trim(), metal, kind };
    const chosen = Object.entries(query).filter(([, value]) => value);
    void this.router.navigate(['/coin-types'], { queryParams: Object.fromEntries(chosen) });
  }

  protected loadAgain(): void {
    this.reload.next();
  }
}

function yearsWords({ from, to }: { readonly from: number; readonly to: number }): string {
  return from === to ? String(from) : `${from}–${to}`;
}
