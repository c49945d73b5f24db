import { FormControl, FormGroup, Validators } from '@angular/forms';
import { parseRate } from '@brakeven/values';

import { findFieldError, parsedBy, showIssues } from './parsed-by';

describe('parsedBy', () => {
  it('says in the reader’s words why a text cannot be taken', () => {
    const control = new FormControl('a lot', parsedBy(parseRate));
    expect(findFieldError(control)).toMatch(/'a lot' is not a rate/);
  });

  it('passes what can be read, and an empty field, which is for required to refuse', () => {
    expect(findFieldError(new FormControl('28.50', parsedBy(parseRate)))).toBeNull();
    expect(findFieldError(new FormControl(' ', parsedBy(parseRate)))).toBeNull();
    expect(findFieldError(new FormControl('', [Validators.required, parsedBy(parseRate)]))).toBe(
      'Fill this in.',
    );
  });
});

describe('findFieldError', () => {
  it('names the limit that was passed', () => {
    expect(findFieldError(new FormControl('abc', Validators.minLength(12)))).toBe('At least 12 characters.');
    expect(findFieldError(new FormControl('abc', Validators.maxLength(2)))).toBe('At most 2 characters.');
    expect(findFieldError(new FormControl('abc', Validators.email))).toMatch(/e-mail address/);
  });
});

describe('showIssues', () => {
  it('puts the server’s words at the field, also one named with its path, and hands back the rest', () => {
    const form = new FormGroup({ number: new FormControl('104'), wagePerHour: new FormControl('30') });
    const rest = showIssues(form, [
      { field: 'number', message: 'Somebody else has this number.' },
      { field: 'rate.wagePerHour', message: 'Too much.' },
      { field: 'shop', message: 'Closed.' },
    ]);
    expect(findFieldError(form.controls.number)).toBe('Somebody else has this number.');
    expect(findFieldError(form.controls.wagePerHour)).toBe('Too much.');
    expect(rest).toEqual([{ field: 'shop', message: 'Closed.' }]);
  });

  it('clears when the field is changed', () => {
    const form = new FormGroup({ number: new FormControl('104') });
    showIssues(form, [{ field: 'number', message: 'Taken.' }]);
    form.controls.number.setValue('105');
    expect(findFieldError(form.controls.number)).toBeNull();
  });
});
