import {
  ChangeDetectionStrategy,
  Component,
  LOCALE_ID,
  computed,
  inject,
  input,
} from '@angular/core';

import { Answer } from './answer-chip';
import { deviationScale } from './deviation-scale';

/**
 * A measurement against its standard: tolerance zone, nominal, uncertainty whisker, measured
 * point, ticks. All figures in `unit`. It only draws: the figures with their unit and the answer
 * stand beside it in words; without `value` the zone stands alone.
 */
@Component({
  selector: 'tn-deviation-bar',
  changeDetection: ChangeDetectionStrategy.OnPush,
  host: { role: 'img', '[attr.aria-label]': 'words()' },
  templateUrl: './deviation-bar.html',
  styleUrl: './deviation-bar.scss',
})
export class DeviationBar {
  private readonly locale = inject(LOCALE_ID);

  /** What is measured, in words: "Weight". */
  readonly quantity = input.required<string>();
  readonly unit = input.required<string>();
  readonly nominal = input<number | null>(null);
  readonly low = input.required<number>();
  readonly high = input.required<number>();
  readonly value = input<number | null>(null);
  /** Half width of the uncertainty interval. */
  readonly uncertainty = input(0);
  readonly answer = input<Answer>('not_tested');

  protected readonly scale = computed(() => {
    const value = this.value();
    const measured =
      value === null ? [] : [value - this.uncertainty(), value + this.uncertainty()];
    return deviationScale([this.low(), this.high(), ...measured]);
  });
  protected readonly zone = computed(() => ({
    left: this.at(this.low()),
    width: this.at(this.high()) - this.at(this.low()),
  }));
  protected readonly nominalAt = computed(() => {
    const nominal = this.nominal();
    return nominal === null ? null : this.at(nominal);
  });
  protected readonly point = computed(() => {
    const value = this.value();
    if (value === null) return null;
    const left = this.at(value - this.uncertainty());
    return { at: this.at(value), left, width: this.at(value + this.uncertainty()) - left };
  });
  protected readonly ticks = computed(() =>
    this.scale().ticks.map((tick) => ({ at: this.at(tick), label: this.figure(tick) })),
  );
  protected readonly words = computed(() => {
    const limits = $localize`${this.quantity()}:quantity:: limits \
${this.figure(this.low())}:low: to ${this.figure(this.high())}:high: ${this.unit()}:unit:`;
    const value = this.value();
    return value === null
      ? limits
      : $localize`${limits}:limits:, measured ${this.figure(value)}:value: ± \
${this.figure(this.uncertainty())}:uncertainty: ${this.unit()}:unit:`;
  });

  private at(figure: number): number {
    const { from, to } = this.scale();
    return ((figure - from) / (to - from)) * 100;
  }

  private figure(value: number): string {
    return value.toLocaleString(this.locale, { maximumFractionDigits: 4 });
  }
}
