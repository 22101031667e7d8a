import { HttpClient } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import { BehaviorSubject, switchMap } from 'rxjs';
import { ReportSearchAnswer } from '#shared/reports/report-view';

import { LoadState, loadState } from '../http/load-state';
import { problemWords } from '../http/problem-words';
import { Caution } from '../ui/caution';
import { Icon } from '../ui/icon';
import { ReportCard } from '../ui/report-card';
import { StateMessage } from '../ui/state-message';
import { HeroCoins } from './hero-coins';

const newestShown = 4;

/** The front page: look a piece up, see what came lately, be told in time. */
@Component({
  selector: 'tn-home',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Caution, HeroCoins, Icon, MatButton, ReportCard, RouterLink, StateMessage],
  templateUrl: './home.html',
  styleUrl: './home.scss',
})
export class Home {
  private readonly http = inject(HttpClient);
  private readonly router = inject(Router);
  private readonly reload = new BehaviorSubject<void>(undefined);

  protected readonly newest = toSignal(
    this.reload.pipe(switchMap(() => loadState(this.newestReports()))),
    { initialValue: { state: 'loading' } satisfies LoadState<ReportSearchAnswer> },
  );
  protected readonly problem = computed(() => {
    const newest = this.newest();
    return newest.state === 'failed' ? newest.problem : null;
  });
  protected readonly problemText = computed(() => {
    const problem = this.problem();
    return problem ? problemWords(problem) : '';
  });

  protected search(event: Event, text: string): void {
    event.preventDefault();
    const words = text.trim();
    void this.router.navigate(['/reports'], { queryParams: words ? { text: words } : {} });
  }

  protected loadAgain(): void {
    this.reload.next();
  }

  private newestReports() {
    return this.http.get<ReportSearchAnswer>('/api/reports', { params: { limit: newestShown } });
  }
}
