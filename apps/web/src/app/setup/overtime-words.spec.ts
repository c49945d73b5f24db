import { parseThreshold, toOvertimeSentence, toThresholdText } from './overtime-words';

describe('the threshold of overtime', () => {
  it('is read as hours of a week, and an empty field as none', () => {
    expect(parseThreshold('40')).toEqual({ ok: true, value: '40.00' });
    expect(parseThreshold('37:30')).toEqual({ ok: true, value: '37.50' });
    expect(parseThreshold('  ')).toEqual({ ok: true, value: null });
  });

  it.each([
    ['0', 'out_of_range'],
    ['-8', 'out_of_range'],
    ['168.01', 'out_of_range'],
    ['37.125', 'too_many_decimals'],
    ['forty', 'not_hours'],
  ])('refuses %s', (text, code) => {
    expect(parseThreshold(text)).toMatchObject({ ok: false, code });
  });

  it('is shown as it was typed', () => {
    expect(toThresholdText('40.00')).toBe('40');
    expect(toThresholdText('37.50')).toBe('37.5');
    expect(toThresholdText(null)).toBe('');
  });
});

describe('what a shop does about overtime', () => {
  it('is told in words', () => {
    expect(toOvertimeSentence({ overtimeThresholdHours: '40.00', overtimeTo: 'overhead' })).toBe(
      'Above 40 h a week, to overhead',
    );
    expect(toOvertimeSentence({ overtimeThresholdHours: '37.50', overtimeTo: 'jobs' })).toBe(
      'Above 37.5 h a week, spread over the week’s jobs',
    );
    expect(toOvertimeSentence({ overtimeThresholdHours: null, overtimeTo: 'jobs' })).toBe('Not computed');
  });
});
