import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { DecisionView } from '#shared/review/review';

import { Confidence } from '../../ui/confidence';
import { basisWords } from '../../ui/report-words';
import { WhenPipe } from '../../ui/when-pipe';
import { decisionWords } from '../review-words';

/** What was decided on this report before, by which club and why. */
@Component({
  selector: 'tn-earlier-decisions',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Confidence, WhenPipe],
  template: `
    <ol class="tn-plain-list">
      @for (row of rows(); track row.madeAt) {
        <li>
          <p class="head">
            <b>{{ row.words }}</b>
            @if (row.confidence) {
              <tn-confidence [value]="row.confidence" />
            }
          </p>
          <p class="tn-meta">
            <ng-container i18n>version {{ row.version }}</ng-container> · {{ row.club }}
            @if (row.mine) {
              &ngsp;(<ng-container i18n>you</ng-container>)
            }
            &ngsp;· {{ row.madeAt | tnWhen: 'date-time' }}
          </p>
          @if (row.basis) {
            <p class="tn-meta"><ng-container i18n>from {{ row.basis }}</ng-container></p>
          }
          <p class="reason">{{ row.reason }}</p>
        </li>
      }
    </ol>
  `,
  styles: `
    li + li {
      margin-top: 14px;
      padding-top: 14px;
      border-top: 1px solid var(--tn-line);
    }
    p {
      margin: 0;
    }
    .head {
      display: flex;
      flex-wrap: wrap;
      gap: 4px 14px;
    }
    .reason {
      margin-top: 4px;
      white-space: pre-line;
      overflow-wrap: anywhere;
    }
  `,
})
export class EarlierDecisions {
  readonly decisions = input.required<readonly DecisionView[]>();

  protected readonly rows = computed(() =>
    this.decisions().map((decision) => ({
      ...decision,
      words: decisionWords(decision.kind),
      basis: decision.basis.map(basisWords).join(', '),
    })),
  );
}
