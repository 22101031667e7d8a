import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { ReviewView } from '#shared/review/review';

/** How the reporter's earlier reports ended. The name is for moderators and goes no further. */
@Component({
  selector: 'tn-reporter-card',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { class: 'tn-card' },
  template: `
    <h2 i18n>The reporter</h2>
    @if (reporter().name) {
      <p class="name">
        <b>{{ reporter().name }}</b>
        <span class="tn-meta" i18n>known to moderators only</span>
      </p>
    }
    <p>
      <ng-container i18n>{reporter().filed, plural,
        =1 {One report filed}
        other {{{ reporter().filed }} reports filed}
      }</ng-container>{{ counts() }}
    </p>
  `,
  styles: `
    h2 {
      margin-bottom: 8px;
      font-size: 20px;
    }
    p {
      margin: 0;
    }
    .name {
      margin-bottom: 6px;
    }
    span {
      display: block;
    }
  `,
})
export class ReporterCard {
  readonly reporter = input.required<ReviewView['reporter']>();

  protected readonly counts = computed(() => {
    const { published, returned, declined, unresolved } = this.reporter();
    const parts = [
      published ? $localize`${published}:count: published` : '',
      returned ? $localize`${returned}:count: returned` : '',
      declined ? $localize`${declined}:count: declined` : '',
      unresolved ? $localize`${unresolved}:count: could not be told` : '',
    ].filter((part) => part);
    return parts.length ? `: ${parts.join(', ')}.` : '.';
  });
}
