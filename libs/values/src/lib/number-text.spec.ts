import { D } from './decimal';
import { findNumberInText, formatNumber } from './number-text';

describe('numbers in text', () => {
  it.each([
    ['12', '12'],
    ['-12.50', '-12.5'],
    ['−3', '-3'],
    ['1,234,567.8', '1234567.8'],
    ['.5', '0.5'],
  ])('are found in %p', (text, expected) => {
    expect(findNumberInText(text)?.toFixed()).toBe(expected);
  });

  it.each(['', '-', '.', '1 234', '1,23', '1,2345', ',123', '1.234,5', '12abc', '1e3', '٣'])(
    'are not guessed in %p',
    (text) => {
      expect(findNumberInText(text)).toBeUndefined();
    },
  );

  it('are shown exactly, beyond what a double can hold', () => {
    expect(formatNumber(D('12345678901234567.25'), 'en-US', { maximumFractionDigits: 2 })).toBe(
      '12,345,678,901,234,567.25',
    );
  });

  it('are shown with ties away from nought and a typographic minus', () => {
    expect(formatNumber(D('-0.125'), 'en-US', { maximumFractionDigits: 2 })).toBe('−0.13');
  });
});
