import { ChangeDetectionStrategy, Component, LOCALE_ID, inject } from '@angular/core';
import { takeUntilDestroyed } from '@angular/core/rxjs-interop';
import {
  NonNullableFormBuilder,
  ReactiveFormsModule,
  ValidatorFn,
  Validators,
} from '@angular/forms';
import { MatFormFieldModule } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { channels } from '#shared/reports/report-content';
import { countryCodes } from '#shared/reports/countries';

import { Icon } from '../../ui/icon';
import { countryName } from '../../ui/place-pipe';
import { channelWords } from '../../ui/report-words';
import { DraftStore } from '../draft-store';

/** Where and when the piece came to light, and the account of it in words. */
@Component({
  selector: 'tn-surfacing-step',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [Icon, MatFormFieldModule, MatInput, ReactiveFormsModule],
  templateUrl: './surfacing-step.html',
  styleUrl: '../step.scss',
})
export class SurfacingStep {
  private readonly locale = inject(LOCALE_ID);
  private readonly store = inject(DraftStore);
  private readonly start = this.store.content();

  protected readonly channels = channels;
  protected readonly channelWords = channelWords;
  protected readonly countries = countryCodes
    .map((code) => ({ code, name: countryName(code, this.locale) }))
    .sort((one, other) => one.name.localeCompare(other.name, this.locale));
  private readonly currencyNames = new Intl.DisplayNames([this.locale], { type: 'currency' });
  protected readonly currencies = Intl.supportedValuesOf('currency').map((code) => ({
    code,
    name: this.currencyNames.of(code) ?? code,
  }));
  /** Open where something is given there already. */
  protected readonly opensMore =
    this.start.surfacing.surfacedOn.length > 7 || !!this.start.surfacing.town ||
    !!this.start.surfacing.venue || this.start.surfacing.price !== null;
  protected readonly thisMonth = new Date().toISOString().slice(0, 7);

  protected readonly form = inject(NonNullableFormBuilder).group({
    channel: [this.start.surfacing.channel ?? '', Validators.required],
    month: [this.start.surfacing.surfacedOn.slice(0, 7), [Validators.required, monthRead]],
    day: [this.start.surfacing.surfacedOn.slice(8, 10), Validators.pattern(/^\d{1,2}$/)],
    country: [this.start.surfacing.country, Validators.required],
    region: [this.start.surfacing.region, Validators.maxLength(120)],
    town: [this.start.surfacing.town, Validators.maxLength(120)],
    venue: [this.start.surfacing.venue, Validators.maxLength(300)],
    price: [
      this.start.surfacing.price === null ? '' : String(this.start.surfacing.price),
      Validators.pattern(/^\d+([.,]\d+)?$/),
    ],
    currency: [this.start.surfacing.currency ?? ''],
    account: [this.start.account, Validators.maxLength(20_000)],
  });

  constructor() {
    this.form.valueChanges.pipe(takeUntilDestroyed()).subscribe(() => this.takeAnswers());
  }

  private takeAnswers(): void {
    const answers = this.form.getRawValue();
    const month = isMonth(answers.month) ? answers.month : '';
    const day = isDayOf(month, answers.day) ? `-${answers.day.padStart(2, '0')}` : '';
    this.form.controls.day.setErrors(!answers.day || !month || day ? null : { noSuchDay: true }, {
      emitEvent: false,
    });
    const price = /^\d+([.,]\d+)?$/.test(answers.price)
      ? Number(answers.price.replace(',', '.'))
      : null;
    this.store.update({
      surfacing: {
        channel: channels.find((channel) => channel === answers.channel) ?? null,
        surfacedOn: month && `${month}${day}`,
        country: answers.country,
        region: answers.region,
        town: answers.town,
        venue: answers.venue,
        price,
        currency: answers.currency || null,
      },
      account: answers.account,
    });
  }
}

function isMonth(written: string): boolean {
  return /^\d{4}-(0[1-9]|1[0-2])$/.test(written);
}

/** Whether the month has such a day; leap years are Gregorian. */
function isDayOf(month: string, day: string): boolean {
  if (!month || !/^\d{1,2}$/.test(day)) return false;
  const [year, number] = month.split('-').map(Number);
  const daysInMonth = new Date(Date.UTC(year ?? 0, number ?? 0, 0)).getUTCDate();
  return Number(day) >= 1 && Number(day) <= daysInMonth;
}

/** Browsers without a picker for months let one type anything. */
const monthRead: ValidatorFn = ({ value }) =>
  value === '' || (typeof value === 'string' && isMonth(value)) ? null : { month: true };
