import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';

import { Caution } from '../../ui/caution';
import { Icon } from '../../ui/icon';
import { IconName } from '../../ui/icon-paths';
import { PageHeader } from '../../ui/page-header';

interface Chapter {
  readonly link: string;
  readonly icon: IconName;
  readonly heading: string;
  readonly about: string;
}

/** What the handbook holds. */
@Component({
  selector: 'tn-handbook-contents',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Caution, Icon, PageHeader, RouterLink],
  host: { class: 'tn-page' },
  template: `
    <tn-page-header i18n-heading heading="Handbook">
      <p class="tn-meta" i18n>
        What to look for, what the words mean, and what a report can and cannot say. No account
        needed.
      </p>
    </tn-page-header>
    <ul class="tn-plain-list chapters">
      @for (chapter of chapters; track chapter.link) {
        <li class="tn-card">
          <tn-icon [name]="chapter.icon" />
          <h2><a [routerLink]="chapter.link">{{ chapter.heading }}</a></h2>
          <p>{{ chapter.about }}</p>
        </li>
      }
    </ul>
    <tn-caution i18n>
      A check that finds nothing wrong is not proof that a piece is genuine: fakes of right weight
      and right alloy exist. In doubt, ask an independent professional.
    </tn-caution>
  `,
  styles: `
    .chapters {
      display: grid;
      grid-template-columns: repeat(auto-fill, minmax(min(300px, 100%), 1fr));
      gap: 20px;
      margin-bottom: 28px;
    }
    li {
      position: relative;
    }
    tn-icon {
      color: var(--tn-verdigris);
      font-size: 24px;
    }
    h2 {
      margin: 8px 0;
      font-size: 22px;
    }
    h2 a::after {
      position: absolute;
      inset: 0;
      content: '';
    }
    li p {
      margin: 0;
    }
  `,
})
export class Contents {
  protected readonly chapters: readonly Chapter[] = [
    {
      link: '/handbook/tells',
      icon: 'eye',
      heading: $localize`The tells`,
      about: $localize`The features that give a fake away, by the way it was made, as they are \
seen on the piece, and the genuine features they are confused with.`,
    },
    {
      link: '/handbook/review',
      icon: 'report',
      heading: $localize`How reports are reviewed`,
      about: $localize`Suspected, probable, confirmed: what each needs, who decides, and how an \
error is put right.`,
    },
    {
      link: '/handbook/cautions',
      icon: 'warning',
      heading: $localize`Cautions and the law`,
      about: $localize`What never to do with a piece you doubt, and where to ask.`,
    },
    {
      link: '/handbook/roles',
      icon: 'club',
      heading: $localize`Who may do what`,
      about: $localize`Visitors, subscribers, members, moderators, secretaries, the registrar.`,
    },
    {
      link: '/coin-types',
      icon: 'scale',
      heading: $localize`Coin types and their standards`,
      about: $localize`Weight, size, fineness, dates and mints, each with where it comes from.`,
    },
  ];
}
