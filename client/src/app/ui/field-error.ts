import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { toObservable, toSignal } from '@angular/core/rxjs-interop';
import { AbstractControl, ValidationErrors } from '@angular/forms';
import { map, startWith, switchMap } from 'rxjs';
import { FieldProblem } from '#shared/api-problem';

import { serverErrorKey } from '../http/form-problems';
import { fieldProblemWords } from '../http/problem-words';

/**
 * The words for what is wrong with a control, whether a validator of the form or the server says
 * so; the first error only. Put it into `mat-error`, or below an input of one's own.
 */
@Component({
  selector: 'tn-field-error',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `{{ words() }}`,
})
export class FieldError {
  readonly control = input.required<AbstractControl>();

  private readonly errors = toSignal(
    toObservable(this.control).pipe(
      switchMap((control) =>
        control.events.pipe(
          startWith(null),
          map(() => control.errors),
        ),
      ),
    ),
  );

  protected readonly words = computed(() => fieldErrorWords(this.errors()));
}

/** Words for a control's errors; empty where there are none. */
export function fieldErrorWords(errors: ValidationErrors | null | undefined): string {
  const first = Object.entries(errors ?? {})[0];
  return first ? fieldProblemWords(problemOfError(first[0], first[1])) : '';
}

/** Angular's own validators, said in the codes of the catalogue. */
function problemOfError(key: string, detail: unknown): Pick<FieldProblem, 'code' | 'parameters'> {
  switch (key) {
    case serverErrorKey:
      return isFieldProblem(detail) ? detail : { code: 'invalid' };
    case 'required':
    case 'requiredtrue':
      return { code: 'required' };
    case 'email':
      return { code: 'not_an_address' };
    case 'min':
      return { code: 'too_small', parameters: { minimum: numberIn(detail, 'min') } };
    case 'max':
      return { code: 'too_big', parameters: { maximum: numberIn(detail, 'max') } };
    case 'minlength':
      return { code: 'too_short', parameters: { minimum: numberIn(detail, 'requiredLength') } };
    case 'maxlength':
      return { code: 'too_long', parameters: { maximum: numberIn(detail, 'requiredLength') } };
    default:
      return { code: key };
  }
}

function isFieldProblem(detail: unknown): detail is FieldProblem {
  return typeof detail === 'object' && detail !== null && 'code' in detail;
}

function numberIn(detail: unknown, key: string): number {
  const value: unknown =
    typeof detail === 'object' && detail !== null ? Reflect.get(detail, key) : 0;
  return typeof value === 'number' ? value : 0;
}
