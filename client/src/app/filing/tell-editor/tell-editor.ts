import { ChangeDetectionStrategy, Component, ElementRef, computed, inject, input, model, output,
  viewChild } from '@angular/core';
import { toSignal } from '@angular/core/rxjs-interop';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatAutocompleteModule } from '@angular/material/autocomplete';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { Subject, startWith, switchMap } from 'rxjs';
import { Disclosure, disclosures } from '#shared/access/audience';
import { TaxonomyView, TellView } from '#shared/catalogue/coin-type-view';
import { PhotoSide } from '#shared/reports/photo';
import { Pin, PinPlace, ReportTell } from '#shared/reports/report-content';
import { genuineFeaturesNamed, narrowerDisclosure } from '#shared/tells/taxonomy';

import { LoadState, loadState } from '../../http/load-state';
import { problemWords } from '../../http/problem-words';
import { CatalogueApi } from '../../reports/catalogue-api';
import { NEW_ID } from '../../ui/new-id';
import { disclosureWords } from '../../ui/report-words';
import { StateMessage } from '../../ui/state-message';
import { DraftStore } from '../draft-store';
import { PinRow } from '../pin-row/pin-row';
import { withPin, withPinMoved, withoutPin } from '../pins';

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
    PinRow,
    ReactiveFormsModule,
    StateMessage,
  ],
  templateUrl: './tell-editor.html',
  styleUrls: ['../step.scss', './tell-editor.scss'],
})
export class TellEditor {
  private readonly catalogue = inject(CatalogueApi);
  private readonly newId = inject(NEW_ID);
  private readonly reloads = new Subject<void>();
  private readonly searchField = viewChild<ElementRef<HTMLInputElement>>('searchField');
  protected readonly store = inject(DraftStore);

  /** The photo that new pins go on. */
  readonly photoId = input<string | null>(null);
  readonly side = input<PhotoSide>('obverse');
  /** True while a spot waits for its tell to be named. */
  readonly isAsked = input(false);
  /** Position of the tell that a tap on the photo places a pin of. */
  readonly chosenTell = model(0);
  readonly tellAdded = output();

  protected readonly disclosureWords = disclosureWords;
  protected readonly words = problemWords;
  protected readonly search = new FormControl<string | TellView>('', { nonNullable: true });
  protected readonly taxonomy = toSignal(
    this.reloads.pipe(
      startWith(undefined),
      switchMap(() => loadState(this.catalogue.tells())),
    ),
    { initialValue: { state: 'loading' } as LoadState<TaxonomyView> },
  );
  private readonly asked = toSignal(this.search.valueChanges.pipe(startWith('')), {
    initialValue: '',
  });
  private readonly all = computed(() => {
    const state = this.taxonomy();
    return state.state === 'ready' ? state.data : null;
  });
  private readonly askedText = computed(() => {
    const asked = this.asked();
    return typeof asked === 'string' ? asked.trim() : '';
  });

  /** Tells that fit the words, under the method that speaks for them first. */
  protected readonly groups = computed(() => {
    const text = this.askedText().toLowerCase();
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

  /** Features of genuine pieces that the words describe, which are no tells. */
  protected readonly genuine = computed(() => this.genuineIn(this.askedText()));

  protected readonly rows = computed(() =>
    this.store.content().tells.map((tell) => {
      const known = this.all()?.tells.find(({ id }) => id === tell.tellId) ?? null;
      return {
        ...tell,
        known,
        alike: (known?.confusedWith ?? []).map(({ id }) => id.replaceAll('-', ' ')).join(', '),
        genuine: this.genuineIn(tell.note),
        disclosures: disclosures.filter(
          (each) =>
            each === tell.disclosure ||
            narrowerDisclosure(each, known?.disclosure ?? 'public') === each,
        ),
      };
    }),
  );

  /** Brings the reader to the list from which a tell is named. */
  focusSearch(): void {
    this.searchField()?.nativeElement.focus();
  }

  protected reloadTells(): void {
    this.reloads.next();
  }

  protected addTell(tell: TellView): void {
    this.search.setValue('');
    const { tells } = this.store.content();
    this.store.update({
      tells: [...tells, { tellId: tell.id, note: '', disclosure: tell.disclosure, pins: [] }],
    });
    this.chosenTell.set(tells.length);
    this.tellAdded.emit();
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

  /** A pin where none is yet, to be moved by numbers or arrow keys. */
  protected addPin(at: number): void {
    const photoId = this.photoId();
    const place = startOf(this.side());
    if (!photoId || !place) return;
    const pin: Pin = { id: this.newId(), photoId, note: '', place };
    this.store.update({ tells: withPin(this.store.content().tells, at, pin) });
    this.chosenTell.set(at);
  }

  protected removePin(id: string): void {
    this.store.update({ tells: withoutPin(this.store.content().tells, id) });
  }

  protected movePin(id: string, place: PinPlace): void {
    this.store.update({ tells: withPinMoved(this.store.content().tells, id, place) });
  }

  protected nameOf(tell: TellView | string): string {
    return typeof tell === 'string' ? tell : tell.name;
  }

  private genuineIn(text: string): string {
    return genuineFeaturesNamed(text, this.all()?.genuineFeatures ?? [])
      .map(({ id, seen }) => `${id.replaceAll('-', ' ')} (${seen.replace(/\.$/, '')})`)
      .join(', ');
  }
}

/** Halfway to the rim at twelve, or half up the edge below the obverse's top; none on details. */
function startOf(side: PhotoSide): PinPlace | null {
  switch (side) {
    case 'detail':
      return null;
    case 'edge':
      return { side, angleDegrees: 0, heightFraction: 0.5 };
    default:
      return { side, clockHours: 0, radiusFraction: 0.5 };
  }
}
