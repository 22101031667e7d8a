import { ChangeDetectionStrategy, Component } from '@angular/core';

/** A caution: ochre with its bar. Content is the sentence; say what to do, not only what not. */
@Component({
  selector: 'tn-caution',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { role: 'note' },
  template: `<ng-content />`,
  styles: `
    :host {
      display: block;
      padding: 14px 18px;
      border-left: 5px solid var(--tn-gold);
      border-radius: 0 var(--tn-radius-control) var(--tn-radius-control) 0;
      background: var(--tn-ochre-soft);
      color: var(--mat-sys-on-surface);
      font-size: 16px;
    }
  `,
})
export class Caution {}
