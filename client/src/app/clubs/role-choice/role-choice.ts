import { ChangeDetectionStrategy, Component, computed, input, model } from '@angular/core';
import { MatCheckbox } from '@angular/material/checkbox';
import { ClubRole } from '#shared/access/audience';

import { roleWords } from '../../ui/report-words';

// A subscriber's rights are part of a member's, so that the choice starts with the member.
const offered: readonly ClubRole[] = ['subscriber', 'member', 'moderator', 'secretary'];

/** Which roles a person holds in a club; moderator and secretary are grants of their own. */
@Component({
  selector: 'tn-role-choice',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatCheckbox],
  template: `
    <fieldset>
      <legend>{{ legend() }}</legend>
      @for (option of options(); track option.role) {
        <mat-checkbox [checked]="option.held" (change)="setRole(option.role, $event.checked)">
          {{ option.label }}
        </mat-checkbox>
      }
    </fieldset>
  `,
  styles: `
    fieldset {
      display: flex;
      flex-wrap: wrap;
      gap: 0 14px;
      margin: 0;
      padding: 0;
      border: 0;
    }
    legend {
      padding: 0;
      font-weight: 700;
    }
    mat-checkbox {
      margin-left: -11px;
    }
  `,
})
export class RoleChoice {
  readonly legend = input.required<string>();
  readonly roles = model.required<readonly ClubRole[]>();

  protected readonly options = computed(() =>
    offered.map((role) => ({ role, label: roleWords(role), held: this.roles().includes(role) })),
  );

  protected setRole(role: ClubRole, held: boolean): void {
    this.roles.update((roles) =>
      offered.filter((each) => (each === role ? held : roles.includes(each))),
    );
  }
}
