import { ChangeDetectionStrategy, Component, computed, inject, input, model } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatAutocompleteModule } from '@angular/material/autocomplete';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { startWith } from 'rxjs';
import { Disclosure, disclosures } from '#shared/access/audience';
import { TaxonomyView, TellView } from '#shared/catalogue/coin-type-view';
import { FacePlace, Pin, ReportTell } from '#shared/reports/report-content';
import { roundFace } from '#shared/tells/coin-coordinates';

import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { CatalogueApi } from '../../reports/catalogue-api';
import { StateMessage } from '../../ui/state-message';
import { clockWords } from '../../ui/pin-layer';
import { disclosureWords, sideWords } from '../../ui/report-words';
import { DraftStore } from '../draft-store';
import { NEW_ID } from '../filing-api';

/**
 * The tells of the report: chosen from the taxonomy, each with a note, who may read it, and its
 * pins, which can be set and moved here by numbers alone.
 */
@Component({
  selector: 'tn-tell-editor',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    MatAutocompleteModule,
    MatButton,
    MatFormFieldModule,
    MatInput,
    ReactiveFormsModule,
    StateMessage,
  ],
  templateUrl: './tell-editor.html',
  styleUrls: ['../step.scss', './tell-editor.scss'],
})
export class TellEditor {
  private readonly catalogue = inject(CatalogueApi);
  private readonly newId = inject(NEW_ID);
  protected readonly store = inject(DraftStore);

  /** The photo that new pins go on; null where it shows no face. */
  readonly photoId = input<string | null>(null);
  readonly side = input<FacePlace['side']>('obverse');
  /** Position of the tell that a tap on the disc places a pin of. */
  readonly chosenTell = model(0);

  protected readonly disclosures = disclosures;
  protected readonly disclosureWords = disclosureWords;
  protected readonly clockWords = clockWords;
  protected readonly sideWords = sideWords;
  protected readonly words = problemWords;
  protected readonly search = new FormControl<string | TellView>('', { nonNullable: true });
  protected readonly taxonomy = toSignal(loadState(this.catalogue.tells()), {
    initialValue: { state: 'loading' } as LoadState<TaxonomyView>,
  });
  private readonly asked = toSignal(this.search.valueChanges.pipe(startWith('')), {
    initialValue: '',
  });
  private readonly all = computed(() => {
    const state = this.taxonomy();
    return state.state === 'ready' ? state.data : null;
  });

  /** Tells that fit the words, under the method that speaks for them first. */
  protected readonly groups = computed(() => {
    const asked = this.asked();
    const text = (typeof asked === 'string' ? asked : '').trim().toLowerCase();
    const taken = new Set(this.store.content().tells.map(({ tellId }) => tellId));
    return (this.all()?.methods ?? [])
      .map((method) => ({
        name: method.name,
        tells: (this.all()?.tells ?? []).filter(
          (tell) =>
            tell.methods[0]?.id === method.id &&
            !taken.has(tell.id) &&
            `${tell.name} ${tell.seen}`.toLowerCase().includes(text),
        ),
      }))
      .filter(({ tells }) => tells.length);
  });

  /** A feature of genuine pieces that the words describe, which is no tell. */
  protected readonly genuine = computed(() => {
    const asked = this.asked();
    return this.genuineIn(typeof asked === 'string' ? asked : '');
  });

  protected readonly rows = computed(() =>
    this.store.content().tells.map((tell) => ({
      ...tell,
      known: this.all()?.tells.find(({ id }) => id === tell.tellId) ?? null,
      genuine: this.genuineIn(tell.note),
    })),
  );

  protected addTell(tell: TellView): void {
    this.search.setValue('');
    const tells = this.store.content().tells;
    this.store.update({
      tells: [...tells, { tellId: tell.id, note: '', disclosure: tell.disclosure, pins: [] }],
    });
    this.chosenTell.set(tells.length);
  }

  protected removeTell(at: number): void {
    this.store.update({ tells: this.store.content().tells.filter((_, index) => index !== at) });
    this.chosenTell.set(0);
  }

  protected changeTell(at: number, change: Partial<ReportTell>): void {
    this.store.update({
      tells: this.store
        .content()
        .tells.map((tell, index) => (index === at ? { ...tell, ...change } : tell)),
    });
  }

  protected disclose(at: number, value: string): void {
    const disclosure = disclosures.find((each): each is Disclosure => each === value);
    if (disclosure) this.changeTell(at, { disclosure });
  }

  /** A pin halfway to the rim at twelve, to be moved by numbers or arrow keys. */
  protected addPin(at: number): void {
    const photoId = this.photoId();
    const tell = this.store.content().tells[at];
    if (!photoId || !tell) return;
    const pin: Pin = {
      id: this.newId(),
      photoId,
      note: '',
      place: { side: this.side(), clockHours: 0, radiusFraction: 0.5 },
    };
    this.changeTell(at, { pins: [...tell.pins, pin] });
    this.chosenTell.set(at);
  }

  protected removePin(at: number, id: string): void {
    const pins = this.store.content().tells[at]?.pins ?? [];
    this.changeTell(at, { pins: pins.filter((pin) => pin.id !== id) });
  }

  /** Takes `3:31` or hours with decimals for the clock, and a fraction for the radius. */
  protected movePin(at: number, pin: Pin, clock: string, fraction: number): void {
    if (pin.place.side === 'edge') return;
    const [hours = '', minutes = '0'] = clock.split(':');
    const clockHours = (Number(hours) + Number(minutes) / 60) % 12;
    if (Number.isNaN(clockHours) || Number.isNaN(fraction)) return;
    const place = roundFace({ side: pin.place.side, clockHours, radiusFraction: fraction });
    const pins = this.store.content().tells[at]?.pins ?? [];
    this.changeTell(at, {
      pins: pins.map((each) => (each.id === pin.id ? { ...each, place } : each)),
    });
  }

  protected nameOf(tell: TellView | string): string {
    return typeof tell === 'string' ? tell : tell.name;
  }

  private genuineIn(text: string): string {
    const words = text.trim().toLowerCase();
    if (words.length < 5) return '';
    const feature = (this.all()?.genuineFeatures ?? []).find(({ id }) =>
      words.includes(id.replaceAll('-', ' ').replace(/s$/, '')),
    );
    return feature ? `${feature.id.replaceAll('-', ' ')}: ${feature.seen}` : '';
  }
}
