import { NgTemplateOutlet } from '@angular/common';
import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  inject,
  signal,
} from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import {
  FormControl,
  NonNullableFormBuilder,
  ReactiveFormsModule,
  Validators,
} from '@angular/forms';
import { MatAutocompleteModule } from '@angular/material/autocomplete';
import { MatButton } from '@angular/material/button';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { catchError, debounceTime, filter, map, of, startWith, switchMap } from 'rxjs';
import { CoinTypeSummary } from '#shared/catalogue/coin-type-view';
import {
  ComponentKind,
  Judgement,
  Metal,
  componentKinds,
  conditions,
  judgements,
  metals,
  pieceKinds,
  whereaboutsKinds,
} from '#shared/reports/report-content';

import { SessionStore } from '../../auth/session-store';
import { CatalogueApi } from '../../reports/catalogue-api';
import { FieldError } from '../../ui/field-error';
import {
  componentWords,
  conditionWords,
  judgementWords,
  metalWords,
  pieceKindWords,
  whereaboutsWords,
} from '../../ui/report-words';
import { DraftStore } from '../draft-store';
import { speaksOfPaperMoney } from '../filing-content';

/** What the piece is presented as; its state, its holder and label, one piece or a lot. */
@Component({
  selector: 'tn-piece-step',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [
    FieldError,
    MatAutocompleteModule,
    MatButton,
    MatFormFieldModule,
    MatInput,
    NgTemplateOutlet,
    ReactiveFormsModule,
  ],
  templateUrl: './piece-step.html',
  styleUrl: '../step.scss',
})
export class PieceStep {
  private readonly catalogue = inject(CatalogueApi);
  private readonly builder = inject(NonNullableFormBuilder);
  protected readonly store = inject(DraftStore);
  protected readonly clubs = inject(SessionStore).clubsAs('member');

  protected readonly conditions = conditions;
  protected readonly whereabouts = whereaboutsKinds;
  protected readonly kinds = pieceKinds;
  protected readonly metals = metals;
  protected readonly components = componentKinds;
  protected readonly judgements = judgements;
  protected readonly conditionWords = conditionWords;
  protected readonly whereaboutsWords = whereaboutsWords;
  protected readonly kindWords = pieceKindWords;
  protected readonly metalWords = metalWords;
  protected readonly componentWords = componentWords;
  protected readonly judgementWords = judgementWords;

  private readonly start = this.store.content();
  protected readonly search = new FormControl<string | CoinTypeSummary>('', {
    nonNullable: true,
  });
  protected readonly form = this.builder.group({
    club: [this.start.club],
    kind: [this.start.presentedAs.kind],
    metal: [this.start.presentedAs.metal ?? ''],
    description: [this.start.presentedAs.description, Validators.maxLength(200)],
    year: [
      this.start.presentedAs.year === null ? '' : String(this.start.presentedAs.year),
      Validators.pattern(/^-?\d{1,4}$/),
    ],
    mintMark: [this.start.presentedAs.mintMark, Validators.maxLength(40)],
    pieceCount: [this.start.pieceCount, [Validators.min(1), Validators.max(100_000)]],
    condition: [this.start.condition],
    whereabouts: [this.start.whereabouts],
  });
  protected readonly isDescribed = signal(
    !this.start.presentedAs.coinType && this.start.presentedAs.description !== '',
  );
  protected readonly chosenType = signal<Pick<CoinTypeSummary, 'slug' | 'name'> | null>(null);
  protected readonly hasType = computed(() => this.store.content().presentedAs.coinType !== null);
  private readonly typed = toSignal(this.search.valueChanges, { initialValue: '' });
  /** Words in the search that no coin type was chosen for. */
  protected readonly unchosen = computed(() => {
    const typed = this.typed();
    const text = typeof typed === 'string' ? typed.trim() : '';
    return text === this.chosenType()?.name ? '' : text;
  });
  protected readonly isPaperMoney = computed(() =>
    speaksOfPaperMoney(
      this.isDescribed() ? this.store.content().presentedAs.description : this.unchosen(),
    ),
  );

  protected readonly found = toSignal(
    this.search.valueChanges.pipe(
      startWith(''),
      debounceTime(200),
      filter((typed) => typeof typed === 'string'),
      switchMap((text) =>
        this.catalogue.coinTypes({ text: text.trim() }).pipe(
          map(({ items }) => ({ items, failed: false })),
          catchError(() => of({ items: [] as readonly CoinTypeSummary[], failed: true })),
        ),
      ),
    ),
  );

  constructor() {
    this.form.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => this.takeAnswers());
    const slug = this.start.presentedAs.coinType;
    if (slug) {
      this.catalogue
        .coinType(slug)
        .pipe(
          catchError(() => of({ slug, name: slug })),
          takeUntilDestroyed(),
        )
        .subscribe((type) => this.showType(type));
    }
    // Undo and the other tab change the store from outside; the fields follow.
    effect(() => {
      const { presentedAs, pieceCount, condition, whereabouts, club } = this.store.content();
      this.form.patchValue(
        {
          club,
          kind: presentedAs.kind,
          metal: presentedAs.metal ?? '',
          pieceCount,
          condition,
          whereabouts,
        },
        { emitEvent: false },
      );
    });
  }

  protected chooseType(type: CoinTypeSummary): void {
    this.showType(type);
    this.isDescribed.set(false);
    this.form.patchValue({ description: '' }, { emitEvent: false });
    this.store.update({
      presentedAs: {
        ...this.store.content().presentedAs,
        coinType: type.slug,
        kind: type.kind,
        metal: type.metal,
        description: '',
      },
    });
  }

  protected forgetType(): void {
    this.chosenType.set(null);
    this.search.setValue('');
    this.store.update({
      presentedAs: { ...this.store.content().presentedAs, coinType: null },
    });
  }

  /** What was typed for the search goes along: most often it is the description. */
  protected describeInstead(): void {
    const description = this.unchosen();
    this.forgetType();
    this.isDescribed.set(true);
    if (description) this.form.patchValue({ description });
  }

  protected judgementOf(kind: ComponentKind): Judgement {
    return (
      this.store.content().components.find((component) => component.kind === kind)?.judgement ??
      'not_present'
    );
  }

  protected judge(kind: ComponentKind, judgement: string): void {
    const wanted = judgements.find((each) => each === judgement);
    if (!wanted) return;
    const { components } = this.store.content();
    const note = components.find((component) => component.kind === kind)?.note ?? '';
    const others = components.filter((component) => component.kind !== kind);
    this.store.update({
      components:
        wanted === 'not_present' ? others : [...others, { kind, judgement: wanted, note }],
    });
  }

  protected nameOf(type: CoinTypeSummary | string | null): string {
    return typeof type === 'object' && type ? type.name : (type ?? '');
  }

  private showType(type: Pick<CoinTypeSummary, 'slug' | 'name'>): void {
    this.chosenType.set({ slug: type.slug, name: type.name });
    this.search.setValue(type.name, { emitEvent: false });
  }

  private takeAnswers(): void {
    const answers = this.form.getRawValue();
    const year = /^-?\d{1,4}$/.test(answers.year) ? Number(answers.year) : null;
    const count = Number(answers.pieceCount);
    this.store.update({
      club: answers.club,
      presentedAs: {
        ...this.store.content().presentedAs,
        kind: answers.kind,
        metal: metals.find((metal): metal is Metal => metal === answers.metal) ?? null,
        description: answers.description,
        year,
        mintMark: answers.mintMark,
      },
      pieceCount: Number.isInteger(count) && count >= 1 ? Math.min(count, 100_000) : 1,
      condition: answers.condition,
      whereabouts: answers.whereabouts,
    });
  }
}
