import { ChangeDetectionStrategy, Component, computed, input, output, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { Metal } from '#shared/reports/report-content';
import { WatchFilter } from '#shared/watches/watch-filter';

import { metalWords } from '../../ui/report-words';

const offered: readonly Metal[] = ['gold', 'silver', 'platinum', 'copper', 'bronze',
  'cupro_nickel'];

/** The first watch is one choice: the metals one collects, a mail a week. */
@Component({
  selector: 'tn-metal-start',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatCheckbox],
  template: `
    <fieldset>
      <legend i18n>My metals, a mail a week</legend>
      <p id="metals-hint" class="tn-meta" i18n>
        One mail on Monday morning, and only where something new was published.
      </p>
      <div class="metals">
        @for (metal of metals; track metal.value) {
          <mat-checkbox [checked]="chosen().includes(metal.value)"
            (change)="toggleMetal(metal.value, $event.checked)">{{ metal.words }}</mat-checkbox>
        }
      </div>
    </fieldset>
    @if (missing()) {
      <p class="missing" role="alert" i18n>Choose one metal at least.</p>
    }
    <button matButton="filled" type="button" [disabled]="busy()" (click)="startWatch()" i18n>
      Watch these metals
    </button>
  `,
  styles: `
    :host {
      display: flex;
      flex-direction: column;
      gap: 12px;
      align-items: flex-start;
    }
    fieldset {
      margin: 0;
      padding: 0;
      border: 0;
    }
    legend {
      padding: 0;
      font: 600 21px/1.2 var(--tn-font-heading);
    }
    p {
      margin: 4px 0 6px;
    }
    .metals {
      display: flex;
      flex-wrap: wrap;
      gap: 0 18px;
    }
    .missing {
      margin: 0;
      color: var(--mat-sys-error);
      font-weight: 600;
    }
  `,
})
export class MetalStart {
  readonly busy = input(false);

  readonly started = output<WatchFilter>();

  protected readonly metals = offered.map((value) => ({ value, words: metalWords(value) }));
  protected readonly chosen = signal<readonly Metal[]>([]);
  protected readonly asked = signal(false);
  protected readonly missing = computed(() => this.asked() && !this.chosen().length);

  protected toggleMetal(metal: Metal, on: boolean): void {
    this.chosen.update((chosen) =>
      offered.filter((each) => (each === metal ? on : chosen.includes(each))));
  }

  protected startWatch(): void {
    this.asked.set(true);
    if (this.chosen().length && !this.busy()) this.started.emit({ metal: this.chosen() });
  }
}
