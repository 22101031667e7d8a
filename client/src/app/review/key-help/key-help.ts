import { ChangeDetectionStrategy, Component, inject } from '@angular/core';

import { DeskKeys } from '../desk-keys';

/** What the keys do, and the switch that turns the single ones off. */
@Component({
  selector: 'tn-key-help',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './key-help.html',
  styles: `
    :host {
      display: block;
      padding: 12px 18px 16px;
      border-top: 1px solid var(--tn-line);
      background: var(--mat-sys-surface-container-low);
      font-size: 16px;
    }
    dl {
      display: grid;
      grid-template-columns: auto 1fr;
      gap: 4px 14px;
      margin: 0 0 10px;
    }
    dd {
      margin: 0;
    }
    kbd {
      font-family: var(--tn-font-mono);
      font-weight: 700;
    }
    label {
      display: flex;
      gap: 10px;
      align-items: center;
    }
    input {
      width: 20px;
      height: 20px;
      accent-color: var(--mat-sys-primary);
    }
  `,
})
export class KeyHelp {
  protected readonly keys = inject(DeskKeys);
}
