import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';

/** Stands beside the queue until a report is opened. */
@Component({
  selector: 'tn-desk-start',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [RouterLink],
  template: `
    <div class="tn-card">
      <h2 i18n>Open a report from the queue</h2>
      <p i18n>
        The oldest stands first. Read the evidence, claim the report, then decide: publish it,
        return it with notes, decline it, or say that it cannot be told.
      </p>
      <p i18n>
        Judge the piece, never the seller. What goes public needs two moderators of two clubs.
      </p>
      <a routerLink="/handbook/review" i18n>How reports are reviewed</a>
    </div>
  `,
  styles: `
    h2 {
      margin-bottom: 12px;
    }
    p {
      max-width: var(--tn-text-width);
    }
    @media (max-width: 1099px) {
      :host {
        display: none;
      }
    }
  `,
})
export class DeskStart {}
