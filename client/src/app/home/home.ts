import { ChangeDetectionStrategy, Component } from '@angular/core';

@Component({
  selector: 'tn-home',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<h1 i18n>Put it beside what is known.</h1>`,
})
export class Home {}
