import { TestBed } from '@angular/core/testing';

import { PinLayer, PlacedPin, clockWords, spotOf } from './pin-layer';

const pins: PlacedPin[] = [
  { id: 'a', number: 1, label: 'Edge seam', place: face(3, 1) },
  { id: 'b', number: 2, label: 'Rounded pit', place: face(12.7 % 12, 0.67) },
];

function face(clockHours: number, radiusFraction: number): PlacedPin['place'] {
  return { side: 'obverse', clockHours, radiusFraction };
}

describe('spotOf', () => {
  it.each([
    [0, 1, 50, 0],
    [3, 1, 100, 50],
    [6, 0.5, 50, 75],
    [9, 0, 50, 50],
  ])('puts %s o’clock at fraction %s to (%s, %s)', (hours, fraction, x, y) => {
    const spot = spotOf(face(hours, fraction));
    expect(spot.x).toBeCloseTo(x);
    expect(spot.y).toBeCloseTo(y);
  });
});

describe('clockWords', () => {
  it.each([
    [0, '12:00'],
    [0.7, '12:42'],
    [8.12, '8:07'],
    [11.9999, '12:00'],
  ])('says %s hours as %s', (hours, words) => {
    expect(clockWords(hours)).toBe(words);
  });
});

describe('PinLayer', () => {
  it('makes each pin a named button that tells which was chosen', () => {
    const fixture = TestBed.createComponent(PinLayer);
    const chosen: string[] = [];
    fixture.componentRef.setInput('pins', pins);
    fixture.componentRef.setInput('chosen', 'a');
    fixture.componentInstance.pinChosen.subscribe((id) => chosen.push(id));
    fixture.detectChanges();

    const buttons = [...(fixture.nativeElement as HTMLElement).querySelectorAll('button')];
    expect(buttons.map((button) => button.getAttribute('aria-pressed'))).toEqual(['true', 'false']);
    expect(buttons[1]?.getAttribute('aria-label')).toBe(
      '2: Rounded pit, obverse at 12:42, 0.67 of the radius',
    );
    buttons[1]?.click();
    expect(chosen).toEqual(['b']);
  });
});
