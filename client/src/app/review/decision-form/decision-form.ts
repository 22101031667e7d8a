import { ChangeDetectionStrategy, Component, ElementRef, computed, effect, inject, input, output,
  signal, untracked, viewChild } from '@angular/core';
import { takeUntilDestroyed, toSignal } from '@angular/core/rxjs-interop';
import { AbstractControl, FormControl, NonNullableFormBuilder, ReactiveFormsModule,
  ValidationErrors, Validators } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { MatCheckbox } from '@angular/material/checkbox';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatRadioButton, MatRadioGroup } from '@angular/material/radio';
import { map } from 'rxjs';
import { ApiProblem } from '#shared/api-problem';
import { Confidence as ConfidenceValue, ConfidenceBasis, confidenceBases,
  confidences } from '#shared/reports/report-content';
import { DecisionKind } from '#shared/review/review';

import { markFieldProblems } from '../../http/form-problems';
import { Caution } from '../../ui/caution';
import { Confidence } from '../../ui/confidence';
import { FieldError } from '../../ui/field-error';
import { basisWords } from '../../ui/report-words';
import { ClaimState } from '../claim-state';
import { basisProblem, publishes } from '../decision-rules';
import { DecisionDraft, QueueStore } from '../queue-store';
import { TimedReview } from '../review-api';
import { actWords, outcomeWords, outcomesOfStage } from '../review-words';

const reasonAtMost = 4000;

/** A decision as typed: outcome, confidence with its basis, and the reason for the reporter. */
@Component({
  selector: 'tn-decision-form',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Caution, Confidence, FieldError, MatButton, MatCheckbox, MatFormFieldModule, MatInput,
    MatRadioButton, MatRadioGroup, ReactiveFormsModule],
  templateUrl: './decision-form.html',
  styleUrl: './decision-form.scss',
})
export class DecisionForm {
  private readonly store = inject(QueueStore);
  private readonly builder = inject(NonNullableFormBuilder);
  protected readonly claim = inject(ClaimState);

  readonly review = input.required<TimedReview>();
  readonly busy = input(false);
  /** What the server refused; marks the fields it names. */
  readonly problem = input<ApiProblem | null>(null);

  readonly decided = output<DecisionDraft & { readonly kind: DecisionKind }>();
  readonly claimed = output();

  private readonly outcome = viewChild.required<ElementRef<HTMLSelectElement>>('outcome');

  protected readonly form = this.builder.group({
    kind: new FormControl<DecisionKind | null>(null, Validators.required),
    confidence: new FormControl<ConfidenceValue | null>(null, checkConfidence),
    basis: this.builder.control<readonly ConfidenceBasis[]>([], checkBasis),
    reason: ['', [Validators.required, Validators.maxLength(reasonAtMost)]],
  });
  private readonly value = toSignal(
    this.form.valueChanges.pipe(map(() => this.form.getRawValue())),
    { initialValue: this.form.getRawValue() },
  );

  protected readonly number = computed(() => this.review().report.number);
  protected readonly asked = computed(
    () => this.review().report.askedAudience ?? this.review().report.audience ?? 'clubs',
  );
  protected readonly outcomes = computed(() => {
    const stage = this.review().stage;
    return stage
      ? outcomesOfStage[stage].map((kind) => ({ kind, words: outcomeWords(kind) }))
      : [];
  });
  protected readonly confidences = confidences;
  protected readonly bases = confidenceBases.map((value) => ({ value, words: basisWords(value) }));
  protected readonly isPublishing = computed(() => publishes(this.value().kind));
  protected readonly act = computed(() => actWords(this.value().kind, this.asked()));
  protected readonly reasonAtMost = reasonAtMost;
  protected readonly sent = signal(false);

  constructor() {
    const { kind, confidence, basis } = this.form.controls;
    kind.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => {
      confidence.updateValueAndValidity();
    });
    confidence.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => {
      basis.updateValueAndValidity();
    });
    // Text typed for one report must never slip into another: the number decides what is shown.
    effect(() => {
      const draft = this.store.draftOf(this.number());
      untracked(() => {
        this.form.reset({ kind: null, confidence: null, basis: [], reason: '', ...draft });
        this.sent.set(false);
      });
    });
    this.form.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => {
      if (this.form.dirty) this.store.keepDraft(this.number(), this.form.getRawValue());
    });
    effect(() => {
      const problem = this.problem();
      if (problem) untracked(() => markFieldProblems(this.form, problem));
    });
  }

  focusOutcome(): void {
    this.outcome().nativeElement.focus();
  }

  protected toggleBasis(value: ConfidenceBasis, on: boolean): void {
    const { basis } = this.form.controls;
    const others = basis.value.filter((each) => each !== value);
    basis.markAsDirty();
    basis.setValue(confidenceBases.filter((each) => (each === value ? on : others.includes(each))));
  }

  protected sendDecision(): void {
    this.sent.set(true);
    this.form.markAllAsTouched();
    const { kind, confidence, basis, reason } = this.form.getRawValue();
    if (this.form.invalid || kind === null || this.busy()) return;
    const publishing = publishes(kind);
    this.decided.emit({
      kind,
      confidence: publishing ? confidence : null,
      basis: publishing ? basis : [],
      reason: reason.trim(),
    });
  }
}

// The rules look across fields; each control finds the others through the form it stands in.
function checkConfidence(control: AbstractControl): ValidationErrors | null {
  return publishes(kindBeside(control)) && !control.value ? { required: true } : null;
}

function checkBasis(control: AbstractControl): ValidationErrors | null {
  const confidence: ConfidenceValue | null = control.parent?.get('confidence')?.value ?? null;
  const problem = basisProblem(kindBeside(control), confidence, control.value);
  return problem && { [problem]: true };
}

function kindBeside(control: AbstractControl): DecisionKind | null {
  return control.parent?.get('kind')?.value ?? null;
}
