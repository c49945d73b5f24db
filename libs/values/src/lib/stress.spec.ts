import { D } from './decimal';
import { findStressUnit, parseStress, stressIn, toStress } from './stress';

describe('strengths', () => {
  // Source: NIST SP 811, appendix B: 1 ksi = 6.894757 MPa; 60 ksi = 413.685 437 590 MPa.
  it('are converted as published', () => {
    expect(stressIn(toStress(60, 'ksi'), 'MPa').toFixed(9)).toBe('413.685437590');
    expect(stressIn(toStress(60_000, 'psi'), 'ksi').minus(D(60)).abs().lt('1e-20')).toBe(true);
  });

  it.each([
    ['60 ksi', '413.685'],
    ['60,000 psi', '413.685'],
    ['400 MPa', '400.000'],
    ['400 N/mm²', '400.000'],
    ['60', '413.685'],
  ])('are read from %p, bare numbers as ksi', (text, expected) => {
    const read = parseStress(text, 'ksi');
    expect(read.ok && read.value.toFixed(3)).toBe(expected);
  });

  it('refuse another unit with an example', () => {
    expect(parseStress('60 bar', 'ksi')).toMatchObject({
      ok: false,
      code: 'unknown_unit',
      message: expect.stringContaining('such as 60 ksi'),
    });
    expect(findStressUnit('KSI')).toBe('ksi');
  });
});
