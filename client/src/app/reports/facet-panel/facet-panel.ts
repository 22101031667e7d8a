import {
  ChangeDetectionStrategy,
  Component,
  LOCALE_ID,
  computed,
  inject,
  input,
  output,
  signal,
} from '@angular/core';
import { MatCheckbox } from '@angular/material/checkbox';
import { FacetCount, FacetName } from '#shared/reports/report-view';
import { WatchFilter } from '#shared/watches/watch-filter';

import { CatalogueNames, facetHeading, facetValueWords, noNames } from '../facet-words';

export interface FacetChoice {
  readonly name: FacetName;
  readonly value: string;
  readonly chosen: boolean;
}

// The order on screen: what a reader narrows by first.
const groupOrder: readonly FacetName[] = [
  'metal', 'kind', 'confidence', 'channel', 'country', 'coinType', 'tell',
];
const shownAtFirst = 6;

/** The filters of the report list: a group of check boxes with counts for each facet. */
@Component({
  selector: 'tn-facet-panel',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [MatCheckbox],
  templateUrl: './facet-panel.html',
  styleUrl: './facet-panel.scss',
})
export class FacetPanel {
  private readonly locale = inject(LOCALE_ID);
  private readonly opened = signal<ReadonlySet<FacetName>>(new Set());

  readonly facets = input.required<Readonly<Record<FacetName, readonly FacetCount[]>> | null>();
  readonly filter = input.required<WatchFilter>();
  readonly names = input<CatalogueNames>(noNames);

  readonly facetChosen = output<FacetChoice>();

  protected readonly groups = computed(() =>
    groupOrder
      .map((name) => this.group(name))
      .filter(({ options }) => options.length > 0),
  );

  protected choose(name: FacetName, value: string, chosen: boolean): void {
    this.facetChosen.emit({ name, value, chosen });
  }

  protected toggleAll(name: FacetName): void {
    this.opened.update((opened) => {
      const next = new Set(opened);
      if (!next.delete(name)) next.add(name);
      return next;
    });
  }

  private group(name: FacetName) {
    const chosen = this.filter()[name] ?? [];
    const counted = this.facets()?.[name] ?? [];
    // A chosen value without any hit stays on screen, else it could not be taken away.
    const missing = chosen
      .filter((value) => !counted.some((each) => each.value === value))
      .map((value): FacetCount => ({ value, count: 0 }));
    const options = [...missing, ...counted].map(({ value, count }) => ({
      value,
      count: count.toLocaleString(this.locale),
      label: facetValueWords(name, value, this.names(), this.locale),
      chosen: chosen.includes(value),
    }));
    const isOpen = this.opened().has(name);
    return {
      name,
      heading: facetHeading(name),
      options: isOpen
        ? options
        : options.filter((option, index) => index < shownAtFirst || option.chosen),
      more: options.length - shownAtFirst,
      isOpen,
    };
  }
}
