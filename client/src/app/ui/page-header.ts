import { ChangeDetectionStrategy, Component, input } from '@angular/core';
import { RouterLink } from '@angular/router';

export interface Crumb {
  readonly label: string;
  /** Absolute path inside the app; the last crumb, the page itself, has none. */
  readonly link?: string;
}

/**
 * The head of a screen: crumbs, the main heading, and as content a line below it. What carries
 * the attribute `actions` stands to the right (below on a phone).
 */
@Component({
  selector: 'tn-page-header',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterLink],
  template: `
    @if (crumbs().length) {
      <nav i18n-aria-label aria-label="Where this page belongs">
        <ol>
          @for (crumb of crumbs(); track crumb.label) {
            <li>
              @if (crumb.link) {
                <a [routerLink]="crumb.link">{{ crumb.label }}</a>
              } @else {
                <span aria-current="page">{{ crumb.label }}</span>
              }
            </li>
          }
        </ol>
      </nav>
    }
    <div class="head">
      <div class="words">
        <h1 tabindex="-1">{{ heading() }}</h1>
        <ng-content />
      </div>
      <div class="actions"><ng-content select="[actions]" /></div>
    </div>
  `,
  styleUrl: './page-header.scss',
})
export class PageHeader {
  readonly heading = input.required<string>();
  readonly crumbs = input<readonly Crumb[]>([]);
}
