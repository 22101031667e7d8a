import { ChangeDetectionStrategy, Component } from '@angular/core';

import { Caution } from '../../ui/caution';
import { Confidence } from '../../ui/confidence';
import { PageHeader } from '../../ui/page-header';
import { handbookCrumbs } from '../handbook-crumbs';

/** How a report is decided, in plain words. */
@Component({
  selector: 'tn-handbook-review-guide',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Caution, Confidence, PageHeader],
  host: { class: 'tn-page' },
  templateUrl: './review-guide.html',
  styleUrl: '../prose.scss',
})
export class ReviewGuide {
  protected readonly crumbs = handbookCrumbs($localize`How reports are reviewed`);
}
