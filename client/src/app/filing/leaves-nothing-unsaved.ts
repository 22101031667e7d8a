import { inject } from '@angular/core';
import { CanDeactivateFn } from '@angular/router';
import { DOCUMENT } from '@angular/common';

export interface MayBeUnsaved {
  hasUnsaved(): boolean;
}

/** Asks before what is not on the server yet is left behind. */
export const leavesNothingUnsaved: CanDeactivateFn<MayBeUnsaved> = (screen) => {
  if (!screen.hasUnsaved()) return true;
  const view = inject(DOCUMENT).defaultView;
  return (
    view?.confirm($localize`Your last changes are not saved on the server yet. Leave anyway?`) ??
    true
  );
};
