import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { ApiProblem } from '#shared/api-problem';

import { Icon } from './icon';

/**
 * What stands where data will be: `loading` (grey shapes, spoken after a moment), `empty` (a
 * heading and, as content, what to do next), `error` (the words of the problem and a retry).
 * The words come from outside, so that this piece knows nothing of the API.
 */
@Component({
  selector: 'tn-state-message',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Icon, MatButton],
  templateUrl: './state-message.html',
  styleUrl: './state-message.scss',
})
export class StateMessage {
  readonly state = input.required<'loading' | 'empty' | 'error'>();
  /** Heading of `empty` and `error`. */
  readonly heading = input('');
  /** The sentence of `error`. */
  readonly message = input('');
  /** How many grey shapes stand for what loads, and whether as cards or as lines. */
  readonly shapes = input(4);
  readonly shape = input<'card' | 'line'>('line');
  /** Given, a status that a retry cannot mend (403, 404) offers none. */
  readonly problem = input<Pick<ApiProblem, 'status'> | null>(null);

  readonly retried = output();

  protected readonly shapeList = computed(() => Array.from({ length: this.shapes() }));
  protected readonly offersRetry = computed(
    () => ![403, 404].includes(this.problem()?.status ?? 0),
  );
}
