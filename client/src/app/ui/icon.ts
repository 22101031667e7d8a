import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';

import { IconName, iconPaths } from './icon-paths';

/** A line drawing in the colour and size of the text; never the only carrier of a meaning. */
@Component({
  selector: 'tn-icon',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { 'aria-hidden': 'true' },
  template: `<svg viewBox="0 0 24 24" focusable="false"><path [attr.d]="path()" /></svg>`,
  styles: `
    :host {
      display: inline-flex;
      flex: none;
      width: 1.3em;
      height: 1.3em;
      vertical-align: -0.28em;
    }
    svg {
      width: 100%;
      height: 100%;
      fill: none;
      stroke: currentColor;
      stroke-width: 2;
      stroke-linecap: round;
      stroke-linejoin: round;
    }
  `,
})
export class Icon {
  readonly name = input.required<IconName>();

  protected readonly path = computed(() => iconPaths[this.name()]);
}
