import { LOCALE_ID, Pipe, PipeTransform, inject } from '@angular/core';

/** The name of a country by its ISO 3166-1 alpha-2 code; the code itself where unknown. */
export function countryName(code: string, locale: string): string {
  if (!/^[A-Za-z]{2}$/.test(code)) return code;
  return new Intl.DisplayNames([locale], { type: 'region' }).of(code.toUpperCase()) ?? code;
}

/** "Leipzig, Saxony, Germany": what is known of a place, from the small to the large. */
@Pipe({ name: 'tnPlace' })
export class PlacePipe implements PipeTransform {
  private readonly locale = inject(LOCALE_ID);

  transform(country: string, region = '', town = ''): string {
    const name = country ? countryName(country, this.locale) : '';
    return [town, region, name].filter((part) => part !== '').join(', ');
  }
}
