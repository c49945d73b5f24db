import { fitRamDepth } from '@brakeven/forming';
import { toLocalDate } from '@brakeven/values';
import { DEPTH_STORY } from './forming-story';
import { buildTools, planRuns, planTrials } from './plan-forming';
import { planDemo } from './seed';
import { WEEKS } from './story';

const TODAY = toLocalDate('2026-06-17');
const { firstMonday, weeks } = planDemo(TODAY);
const runs = planRuns(firstMonday, weeks.slice(0, -1));

it('tells the same story every time', () => {
  expect(planRuns(firstMonday, planDemo(TODAY).weeks.slice(0, -1))).toEqual(runs);
  expect(planTrials(firstMonday)).toEqual(planTrials(firstMonday));
});

it('runs both presses on tools that they have, before the week that is still to come in', () => {
  const { punches, dies } = buildTools();
  expect(runs.length).toBeGreaterThan(60);
  expect(new Set(runs.map(({ machine }) => machine))).toEqual(new Set(['P1', 'P2']));
  const lastDay = planDemo(TODAY).weeks.length * 7;
  expect(lastDay).toBe(WEEKS * 7);
  for (const { machine, punch, openingMm, runOn } of runs) {
    expect(punches.some((tool) => tool.machine === machine && tool.punch === punch)).toBe(true);
    expect(dies.some((tool) => tool.machine === machine && tool.openingMm === openingMm)).toBe(true);
    expect(runOn < TODAY).toBe(true);
  }
});

it('bends strips from which its datum and springback can be had', () => {
  const strips = planTrials(firstMonday).filter(
    ({ isFullLength, openingMm }) => !isFullLength && openingMm === '25.4',
  );
  const fit = fitRamDepth(
    strips.map(({ openingMm, thicknessMm, depthMm, measuredAngle }) => ({
      openingMm: Number(openingMm),
      thicknessMm: Number(thicknessMm),
      punchRadiusMm: 0.8,
      shoulderRadiusMm: 2.54,
      depthMm: Number(depthMm),
      insideAngle: Number(measuredAngle),
    })),
    0.16,
  );
  expect(fit.ok && Math.abs(fit.value.datumMm - DEPTH_STORY.datumMm)).toBeLessThan(1);
  expect(fit.ok && Math.abs(fit.value.springback - DEPTH_STORY.springback)).toBeLessThan(3);
});
