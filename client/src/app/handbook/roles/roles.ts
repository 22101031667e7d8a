import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';

import { PageHeader } from '../../ui/page-header';
import { handbookCrumbs } from '../handbook-crumbs';

/** Roles and what each of them may do. */
@Component({
  selector: 'tn-handbook-roles',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [PageHeader, RouterLink],
  host: { class: 'tn-page' },
  templateUrl: './roles.html',
  styleUrl: '../prose.scss',
})
export class Roles {
  protected readonly crumbs = handbookCrumbs($localize`Who may do what`);
}
