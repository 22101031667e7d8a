import { ChangeDetectionStrategy, Component } from '@angular/core';

import { Caution } from '../../ui/caution';
import { PageHeader } from '../../ui/page-header';
import { handbookCrumbs } from '../handbook-crumbs';

/** What no check can say, what never to do, and where to ask. */
@Component({
  selector: 'tn-handbook-cautions',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Caution, PageHeader],
  host: { class: 'tn-page' },
  templateUrl: './cautions.html',
  styleUrl: '../prose.scss',
})
export class Cautions {
  protected readonly crumbs = handbookCrumbs($localize`Cautions and the law`);
}
