import { HttpClient } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { RouterLink } from '@angular/router';
import { BehaviorSubject, switchMap } from 'rxjs';
import { TaxonomyView, TellView } from '#shared/catalogue/coin-type-view';

import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { Caution } from '../../ui/caution';
import { Icon } from '../../ui/icon';
import { PageHeader } from '../../ui/page-header';
import { StateMessage } from '../../ui/state-message';
import { handbookCrumbs } from '../handbook-crumbs';

/** Every tell the reader may know of, under the ways of making that leave it. */
@Component({
  selector: 'tn-handbook-tells',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Caution, Icon, PageHeader, RouterLink, StateMessage],
  host: { class: 'tn-page' },
  templateUrl: './tells.html',
  styleUrl: './tells.scss',
})
export class Tells {
  private readonly http = inject(HttpClient);
  private readonly reload = new BehaviorSubject<void>(undefined);

  protected readonly crumbs = handbookCrumbs($localize`The tells`);
  protected readonly taxonomy = toSignal(
    this.reload.pipe(switchMap(() => loadState(this.http.get<TaxonomyView>('/api/tells')))),
    { initialValue: { state: 'loading' } satisfies LoadState<TaxonomyView> },
  );
  protected readonly problem = computed(() => {
    const taxonomy = this.taxonomy();
    return taxonomy.state === 'failed' ? taxonomy.problem : null;
  });
  protected readonly problemText = computed(() => {
    const problem = this.problem();
    return problem ? problemWords(problem) : '';
  });
  protected readonly groups = computed(() => {
    const taxonomy = this.taxonomy();
    if (taxonomy.state !== 'ready') return [];
    const { methods, tells } = taxonomy.data;
    return methods
      .map((method) => ({ method, tells: tells.filter((tell) => leavesIt(tell, method.id)) }))
      .filter((group) => group.tells.length > 0);
  });

  protected placeAndForm(tell: TellView): string {
    const form =
      tell.form === 'raised' ? $localize`raised` : tell.form === 'sunk' ? $localize`sunk` : '';
    return [form, placeWords(tell.place)].filter((part) => part !== '').join(', ');
  }

  protected loadAgain(): void {
    this.reload.next();
  }
}

function leavesIt(tell: TellView, methodId: string): boolean {
  return tell.methods.some(({ id }) => id === methodId);
}

function placeWords(place: TellView['place']): string {
  switch (place) {
    case 'any':
      return '';
    case 'edge':
      return $localize`on the edge`;
    case 'border':
      return $localize`at the border`;
    case 'whole':
      return $localize`on the whole piece`;
  }
}
