import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { Confidence as ConfidenceValue } from '#shared/reports/report-content';

import { confidenceWords } from './report-words';

const streakLength: Readonly<Record<ConfidenceValue, number>> = {
  suspected: 12,
  probable: 24,
  confirmed: 38,
};

/** How sure the desk is: one streak of growing length, always with its word. */
@Component({
  selector: 'tn-confidence',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <svg viewBox="0 0 42 15" aria-hidden="true" focusable="false">
      <path class="all" d="M3 10C14 7.5 27 8 39 6.5" />
      <path class="known" d="M3 10C14 7.5 27 8 39 6.5" [attr.stroke-dasharray]="dashes()" />
    </svg>
    <span>{{ word() }}</span>
  `,
  styles: `
    :host {
      display: inline-flex;
      align-items: center;
      gap: 8px;
      font-size: 15.5px;
      font-weight: 600;
      white-space: nowrap;
    }
    svg {
      width: 42px;
      height: 15px;
      fill: none;
      stroke-linecap: round;
    }
    .all {
      stroke: var(--tn-line);
      stroke-width: 3;
    }
    .known {
      stroke: var(--tn-verdigris);
      stroke-width: 4;
    }
  `,
})
export class Confidence {
  readonly value = input.required<ConfidenceValue>();

  protected readonly word = computed(() => confidenceWords(this.value()));
  protected readonly dashes = computed(() => `${streakLength[this.value()]} 100`);
}
