import { D, toHours, toMass, toMoney, toPercent, toRate } from '@brakeven/values';
import { computeAverageLoadedRate } from './average-loaded-rate';
import { type OperationEstimate } from './estimate';
import { scaleEstimateLine } from './scale-estimate';

const bending: OperationEstimate = {
  kind: 'operation',
  setupHours: toHours('0.75'),
  minutesPerPiece: D('3.5'),
  pieces: D(24),
  labourRate: toRate('36'),
  machineHourRate: toRate('31.25'),
  overheadRate: toRate('18'),
};

describe('scaleEstimateLine', () => {
  it('scales pieces and leaves set-up and rates', () => {
    expect(scaleEstimateLine(bending, 24, 60)).toEqual({ ...bending, pieces: D(60) });
    expect(scaleEstimateLine({ ...bending, pieces: D(5) }, 24, 60).pieces.toNumber()).toBe(13);
    expect(scaleEstimateLine(bending, 24, 24)).toBe(bending);
  });

  it('keeps at least one piece', () => {
    expect(scaleEstimateLine({ ...bending, pieces: D(1) }, 100, 1).pieces.toNumber()).toBe(1);
  });

  it('scales weight and outside amounts, each rounded once', () => {
    const metal = { kind: 'material', weight: toMass('100', 'kg'), pricePerKg: toRate('1.9') } as const;
    expect(scaleEstimateLine(metal, 3, 2).weight.toFixed()).toBe('66.6666666667');
    const coating = { kind: 'outside', amount: toMoney('10.01') } as const;
    expect(scaleEstimateLine(coating, 2, 1).amount.toFixed(2)).toBe('5.01');
  });

  it('needs numbers of pieces', () => {
    expect(() => scaleEstimateLine(bending, 0, 5)).toThrow(RangeError);
  });
});

describe('computeAverageLoadedRate', () => {
  const wage = (wagePerHour: string, burdenPercent: string) => ({
    wagePerHour: toRate(wagePerHour),
    burdenPercent: toPercent(burdenPercent),
  });

  it('is the mean of wages with burden', () => {
    expect(computeAverageLoadedRate([wage('30', '20'), wage('20', '0'), wage('21', '0')])?.toFixed()).toBe(
      '25.666667',
    );
  });

  it('is nothing of nobody, never 0', () => {
    expect(computeAverageLoadedRate([])).toBeNull();
  });
});
