import { Crumb } from '../ui/page-header';

/** Crumbs of a page of the handbook. */
export function handbookCrumbs(label: string): readonly Crumb[] {
  return [{ label: $localize`Handbook`, link: '/handbook' }, { label }];
}
