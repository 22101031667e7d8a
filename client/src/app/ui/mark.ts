import { ChangeDetectionStrategy, Component } from '@angular/core';

/** The mark: two unequal streaks on the stone, the known and the suspect. Decoration only. */
@Component({
  selector: 'tn-mark',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { 'aria-hidden': 'true' },
  template: `
    <svg viewBox="0 0 34 34" focusable="false">
      <rect class="stone" x="1" y="1" width="32" height="32" rx="8" />
      <path class="known" d="M9 25.5C13 20 16 14.5 19.5 7.5" />
      <path class="suspect" d="M18.5 26.5C20.5 23.5 22 21 24 17" />
    </svg>
  `,
  styles: `
    :host {
      display: inline-block;
      width: 34px;
      height: 34px;
    }
    svg {
      display: block;
      width: 100%;
      height: 100%;
      fill: none;
      stroke-linecap: round;
    }
    .stone {
      fill: #11161a;
      stroke: var(--tn-stone-line);
    }
    .known {
      stroke: #d8ab4d;
      stroke-width: 4.2;
    }
    .suspect {
      stroke: #b9744f;
      stroke-width: 3;
      stroke-dasharray: 5 2.6 1.6 40;
    }
  `,
})
export class Mark {}
