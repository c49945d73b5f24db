import { type FigureRef } from '@brakeven/contract';
import { toCellElement } from './cell-element';
import { compareValues, toCellText } from './cell-text';

describe('toCellText', () => {
  const format = { currency: 'USD' };

  it('writes each kind in its way', () => {
    expect(toCellText('1530.88', 'money', format)).toBe('$1,530.88');
    expect(toCellText('46.0000', 'hours', format)).toBe('46.00');
    expect(toCellText('85.125', 'rate', format)).toBe('$85.125');
    expect(toCellText('2026-11-02', 'date', format)).toBe('Nov 2, 2026');
    expect(toCellText(12310, 'count', format)).toBe('12,310');
    expect(toCellText('Form', undefined, format)).toBe('Form');
  });

  it('leaves a cell empty when there is no value, also in a numeric column', () => {
    expect(toCellText(null, 'money', format)).toBe('');
    expect(toCellText(undefined, 'hours', format)).toBe('');
  });
});

describe('compareValues', () => {
  it('orders amounts as numbers and numbers in words as people do', () => {
    expect(['100.00', '20.00', '3.00'].sort((a, b) => compareValues(a, b, 'money'))).toEqual([
      '3.00',
      '20.00',
      '100.00',
    ]);
    expect(['Press 10', 'Press 2'].sort((a, b) => compareValues(a, b))).toEqual(['Press 2', 'Press 10']);
  });

  it('puts absent values first, even before negative ones', () => {
    expect(compareValues(null, '-5.00', 'money')).toBeLessThan(0);
    expect(compareValues(undefined, null, 'money')).toBe(0);
  });
});

describe('toCellElement', () => {
  const pressed: unknown[] = [];
  const handlers = {
    openWorkings: (ref: FigureRef) => pressed.push(ref),
    followLink: (href: string) => pressed.push(href),
  };

  beforeEach(() => (pressed.length = 0));

  it('makes a figure a button that opens its workings and says what it is', () => {
    const ref: FigureRef = { figure: 'job.labour' };
    const button = toCellElement({ text: '$5.00', label: 'Labour', figure: ref }, handlers).querySelector(
      'button',
    );
    button?.click();
    expect(pressed).toEqual([ref]);
    expect(button?.getAttribute('aria-label')).toBe('Labour: $5.00');
    expect(button?.dataset['press']).toBe('');
  });

  it('follows a link here, but leaves a new tab to the browser', () => {
    const link = toCellElement({ text: '2231', label: 'Job', href: '/jobs/1' }, handlers).querySelector('a');
    const plain = new MouseEvent('click', { cancelable: true });
    const withModifier = new MouseEvent('click', { metaKey: true, cancelable: true });
    link?.dispatchEvent(plain);
    link?.dispatchEvent(withModifier);
    expect(pressed).toEqual(['/jobs/1']);
    expect([plain.defaultPrevented, withModifier.defaultPrevented]).toEqual([true, false]);
  });

  it('shows a problem with a sign and words, not by colour alone', () => {
    const cell = toCellElement(
      { text: '25', label: 'Hours', note: { text: 'More than 24 hours', severity: 'refused' } },
      handlers,
    );
    expect(cell.textContent).toBe('25✕ More than 24 hours');
  });

  it('never takes text for markup', () => {
    const cell = toCellElement({ text: '<img src=x>', label: 'Note' }, handlers);
    expect(cell.querySelector('img')).toBeNull();
    expect(cell.textContent).toBe('<img src=x>');
  });

  it('runs actions', () => {
    const actions = [{ label: 'Void', run: () => pressed.push('void') }];
    toCellElement({ text: '', label: '', actions }, handlers).querySelector('button')?.click();
    expect(pressed).toEqual(['void']);
  });
});
