import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

export type Answer = 'within' | 'outside' | 'cannot_tell' | 'not_tested';

/** One of the bench's four answers, as a word on its colour. */
@Component({
  selector: 'tn-answer-chip',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { '[class]': 'answer()' },
  template: `{{ word() }}`,
  styles: `
    :host {
      display: inline-flex;
      align-items: center;
      padding: 3px 11px;
      border-radius: var(--tn-radius-chip);
      font-size: 15px;
      font-weight: 700;
      white-space: nowrap;
    }
    :host(.within) {
      background: var(--tn-verdigris-soft);
      color: var(--tn-on-verdigris-soft);
    }
    :host(.outside) {
      background: var(--tn-cinnabar-soft);
      color: var(--tn-on-cinnabar-soft);
    }
    :host(.cannot_tell) {
      background: var(--tn-ochre-soft);
      color: var(--tn-on-ochre-soft);
    }
    :host(.not_tested) {
      background: var(--tn-neutral-soft);
      color: var(--tn-text-muted);
    }
  `,
})
export class AnswerChip {
  readonly answer = input.required<Answer>();

  protected readonly word = computed(() => {
    switch (this.answer()) {
      case 'within':
        return $localize`within`;
      case 'outside':
        return $localize`outside`;
      case 'cannot_tell':
        return $localize`cannot tell`;
      case 'not_tested':
        return $localize`not tested`;
    }
  });
}
