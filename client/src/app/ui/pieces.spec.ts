import { Type } from '@angular/core';
import { ComponentFixture, TestBed } from '@angular/core/testing';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { MatButtonHarness } from '@angular/material/button/testing';
import { provideRouter } from '@angular/router';
import { confidences } from '#shared/reports/report-content';

import { AnswerChip } from './answer-chip';
import { Confidence } from './confidence';
import { DeviationBar } from './deviation-bar';
import { Paging } from './paging';
import { ReportNumber } from './report-number';
import { StateMessage } from './state-message';

function draw<Piece>(
  piece: Type<Piece>,
  inputs: Readonly<Record<string, unknown>>,
): { fixture: ComponentFixture<Piece>; element: HTMLElement } {
  TestBed.resetTestingModule();
  TestBed.configureTestingModule({ providers: [provideRouter([])] });
  const fixture = TestBed.createComponent(piece);
  for (const [name, value] of Object.entries(inputs)) {
    fixture.componentRef.setInput(name, value);
  }
  fixture.detectChanges();
  return { fixture, element: fixture.nativeElement as HTMLElement };
}

describe('Confidence', () => {
  it('grows its streak with the confidence and always says the word', () => {
    const lengths = confidences.map((value) => {
      const { element } = draw(Confidence, { value });
      expect(element.textContent?.trim()).toBe(value);
      return parseFloat(element.querySelector('.known')?.getAttribute('stroke-dasharray') ?? '');
    });
    expect(lengths).toEqual([...lengths].sort((a, b) => a - b));
    expect(new Set(lengths).size).toBe(3);
  });
});

describe('ReportNumber', () => {
  it('never stands without the words before it', () => {
    const { element } = draw(ReportNumber, { number: 'TN-26-00042-3' });
    expect(element.textContent).toMatch(/^Counterfeit report\s+TN-26-00042-3$/);
  });
});

describe('AnswerChip', () => {
  it('says its answer in words', () => {
    expect(draw(AnswerChip, { answer: 'cannot_tell' }).element.textContent).toBe('cannot tell');
  });
});

describe('DeviationBar', () => {
  const limits = { quantity: 'Weight', unit: 'g', low: 16.7, high: 16.9, nominal: 16.8 };

  it('is one image that says what it draws', () => {
    const { element } = draw(DeviationBar, {
      ...limits, value: 16.08, uncertainty: 0.03, answer: 'outside',
    });
    expect(element.getAttribute('role')).toBe('img');
    expect(element.getAttribute('aria-label')).toBe(
      'Weight: limits 16.7 to 16.9 g, measured 16.08 ± 0.03 g',
    );
  });

  it('draws the zone alone where nothing was measured', () => {
    const { element } = draw(DeviationBar, limits);
    expect(element.querySelector('.zone')).not.toBeNull();
    expect(element.querySelector('.point')).toBeNull();
  });
});

describe('StateMessage', () => {
  it('offers a retry where one can help', async () => {
    const { fixture } = draw(StateMessage, { state: 'error', message: 'The line is down.' });
    let retries = 0;
    fixture.componentInstance.retried.subscribe(() => (retries += 1));
    const loader = TestbedHarnessEnvironment.loader(fixture);
    await (await loader.getHarness(MatButtonHarness.with({ text: 'Try again' }))).click();
    expect(retries).toBe(1);
  });

  it('offers none where the answer will not change', async () => {
    const { fixture } = draw(StateMessage, { state: 'error', problem: { status: 404 } });
    const loader = TestbedHarnessEnvironment.loader(fixture);
    expect(await loader.getAllHarnesses(MatButtonHarness)).toHaveLength(0);
  });

  it('speaks while it loads', () => {
    const { element } = draw(StateMessage, { state: 'loading', shapes: 3 });
    expect(element.querySelector('[role=status]')?.textContent).toBe('Loading…');
    expect(element.querySelectorAll('.ghost')).toHaveLength(3);
  });
});

describe('Paging', () => {
  it('leads on by key and back to the start', () => {
    const { element } = draw(Paging, { after: 'k1', next: 'k2' });
    const [start, next] = [...element.querySelectorAll('a')];
    expect(start?.getAttribute('href')).toBe('/');
    expect(next?.getAttribute('href')).toBe('/?after=k2');
  });

  it('shows nothing to follow on a single page', () => {
    expect(draw(Paging, { after: null, next: null }).element.querySelectorAll('a')).toHaveLength(0);
  });
});
