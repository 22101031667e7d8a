import { Provider } from '@angular/core';
import { MAT_FORM_FIELD_DEFAULT_OPTIONS } from '@angular/material/form-field';

/**
 * Outlined fields whose hint and error lines take room only when they have words. Goes into the
 * `providers` of a lazy route: at the root it would put the form field into the first load.
 */
export const formDefaults: Provider[] = [
  {
    provide: MAT_FORM_FIELD_DEFAULT_OPTIONS,
    useValue: { appearance: 'outline', subscriptSizing: 'dynamic' },
  },
];
