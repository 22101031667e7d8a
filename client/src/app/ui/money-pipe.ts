import { LOCALE_ID, Pipe, PipeTransform, inject } from '@angular/core';

/** An amount in an ISO 4217 currency; whole amounts stand without decimals. */
@Pipe({ name: 'tnMoney' })
export class MoneyPipe implements PipeTransform {
  private readonly locale = inject(LOCALE_ID);

  transform(amount: number, currency: string): string {
    const whole = Number.isInteger(amount);
    try {
      return new Intl.NumberFormat(this.locale, {
        style: 'currency',
        currency,
        ...(whole ? { maximumFractionDigits: 0 } : {}),
      }).format(amount);
    } catch {
      // Intl refuses what has not three letters; the figure is still worth reading.
      return `${new Intl.NumberFormat(this.locale).format(amount)} ${currency}`;
    }
  }
}
