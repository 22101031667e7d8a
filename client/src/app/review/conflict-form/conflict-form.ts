import { ChangeDetectionStrategy, Component, inject, input, output, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';

import { problemOf } from '../../http/api-failure';
import { problemWords } from '../../http/problem-words';
import { ReviewApi } from '../review-api';

/** A moderator steps back: who knows the parties should not judge the piece. */
@Component({
  selector: 'tn-conflict-form',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatButton, MatFormFieldModule, MatInput],
  template: `
    @if (isOpen()) {
      <form class="tn-stack" (submit)="declareConflict($event, note.value)">
        <p i18n>
          Declare it where you know the reporter or the seller, own such a piece for sale, or have
          another stake. You can still read the report; others decide, and this cannot be undone
          here.
        </p>
        <mat-form-field class="tn-field">
          <mat-label i18n>What the conflict is (kept for the record, optional)</mat-label>
          <textarea #note matInput rows="2" maxlength="500"></textarea>
        </mat-form-field>
        @if (problem()) {
          <p class="problem" role="alert">{{ problem() }}</p>
        }
        <div class="tn-row">
          <button matButton="filled" type="submit" [disabled]="busy()" i18n>
            Declare it and step back
          </button>
          <button matButton type="button" (click)="isOpen.set(false)" i18n>Never mind</button>
        </div>
      </form>
    } @else {
      <button matButton type="button" (click)="isOpen.set(true)" i18n>
        I have a conflict of interest…
      </button>
    }
  `,
  styles: `
    p {
      margin: 0;
    }
    .problem {
      color: var(--mat-sys-error);
    }
  `,
})
export class ConflictForm {
  private readonly api = inject(ReviewApi);

  readonly number = input.required<string>();

  readonly declared = output();

  protected readonly isOpen = signal(false);
  protected readonly busy = signal(false);
  protected readonly problem = signal('');

  protected declareConflict(event: Event, note: string): void {
    event.preventDefault();
    if (this.busy()) return;
    this.busy.set(true);
    this.api.declareConflict(this.number(), note.trim()).subscribe({
      next: () => {
        this.busy.set(false);
        this.isOpen.set(false);
        this.declared.emit();
      },
      error: (error: unknown) => {
        this.busy.set(false);
        this.problem.set(problemWords(problemOf(error)));
      },
    });
  }
}
