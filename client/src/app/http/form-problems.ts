import { AbstractControl } from '@angular/forms';
import { ApiProblem, FieldProblem } from '#shared/api-problem';

/** The key under which a field's problem from the server stands among a control's errors. */
export const serverErrorKey = 'server';

/**
 * Puts the server's field problems on the controls of the same path, where they stay until the
 * control changes. Answers those for which the form has no control, to be shown above it.
 */
export function markFieldProblems(form: AbstractControl, problem: ApiProblem): FieldProblem[] {
  return (problem.fields ?? []).filter((field) => {
    const control = form.get(field.field);
    if (!control) return true;
    control.setErrors({ ...control.errors, [serverErrorKey]: field });
    control.markAsTouched();
    return false;
  });
}
