import { areaIn, parseArea, toArea } from './area';

describe('areas', () => {
  it('are kept in square metres, a square foot being 0.3048² of them', () => {
    expect(areaIn(toArea(120, 'sq ft'), 'm²').toFixed()).toBe('11.1483648');
    expect(areaIn(toArea('11.1483648', 'm²'), 'sq ft').toFixed()).toBe('120');
  });

  it('are read in the unit written, else in the one that goes without saying', () => {
    expect(parseArea('120', 'sq ft')).toEqual(parseArea('120 ft²', 'm²'));
    expect(parseArea('12 m2', 'sq ft')).toMatchObject({ ok: true });
    expect(parseArea('12 acres', 'sq ft')).toMatchObject({ ok: false, code: 'unknown_unit' });
    expect(parseArea('-12', 'sq ft')).toMatchObject({ ok: false, code: 'negative' });
  });
});
