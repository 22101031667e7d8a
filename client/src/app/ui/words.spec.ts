import { TestBed } from '@angular/core/testing';
import { FormControl, FormGroup, Validators } from '@angular/forms';
import { problemCodes } from '#shared/api-problem';

import { markFieldProblems } from '../http/form-problems';
import { problemWords } from '../http/problem-words';
import { FieldError, fieldErrorWords } from './field-error';
import { MoneyPipe } from './money-pipe';
import { PlacePipe } from './place-pipe';

describe('problemWords', () => {
  it.each(problemCodes)('has a sentence for %s', (code) => {
    const words = problemWords({ type: 'about:blank', title: '', status: 400, code });
    expect(words).toMatch(/[.:]$/);
    expect(words).not.toContain('undefined');
  });

  it('gives the number to quote where the server failed', () => {
    const words = problemWords({
      type: 'about:blank', title: '', status: 500, code: 'unexpected', requestId: 'r-17',
    });
    expect(words).toContain('r-17');
  });
});

describe('FieldError', () => {
  it('says the server’s problem until the control changes', () => {
    const form = new FormGroup({ email: new FormControl('anna', { nonNullable: true }) });
    const rest = markFieldProblems(form, {
      type: 'about:blank',
      title: '',
      status: 400,
      code: 'invalid_input',
      fields: [
        { field: 'email', code: 'not_an_address' },
        { field: 'elsewhere', code: 'required' },
      ],
    });
    const fixture = TestBed.createComponent(FieldError);
    fixture.componentRef.setInput('control', form.controls.email);
    fixture.detectChanges();
    const element = fixture.nativeElement as HTMLElement;
    expect(element.textContent).toContain('no e-mail address');
    expect(rest.map(({ field }) => field)).toEqual(['elsewhere']);

    form.controls.email.setValue('anna@example.org');
    fixture.detectChanges();
    expect(element.textContent).toBe('');
  });

  it('says the validators of the form in the same words', () => {
    const control = new FormControl('short', Validators.minLength(12));
    expect(fieldErrorWords(control.errors)).toBe('12 characters at least.');
  });
});

describe('places and money', () => {
  it('names a country and keeps an unknown code', () => {
    const pipe = TestBed.runInInjectionContext(() => new PlacePipe());
    expect(pipe.transform('DE', 'Saxony', 'Leipzig')).toBe('Leipzig, Saxony, Germany');
    expect(pipe.transform('??')).toBe('??');
  });

  it('writes whole amounts without decimals, and survives a wrong currency', () => {
    const pipe = TestBed.runInInjectionContext(() => new MoneyPipe());
    expect(pipe.transform(250, 'EUR')).toBe('€250');
    expect(pipe.transform(2.5, 'GBP')).toBe('£2.50');
    expect(pipe.transform(3, 'coins')).toBe('3 coins');
  });
});
