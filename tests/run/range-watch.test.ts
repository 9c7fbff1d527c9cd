import { describe, expect, test } from 'vitest';

import { createFluids } from '../../sim/column/fluids.ts';
import { rangeWarnings } from '../../sim/run/range-watch.ts';
import { caseText, mustRead } from '../case/support.ts';
import { handMade } from './support.ts';

const plant = mustRead(caseText('acetone-absorber'));
const fluids = createFluids(plant);
/** Superficial velocity at the design rate, m/s. */
const design = (4 * plant.liquid.feed.rate) / (Math.PI * plant.column.diameter ** 2);
const time = [0, 10, 20];
const normal = Object.fromEntries(
  ['top', 'middle', 'bottom'].flatMap((place) => [
    [`liquid-load.${place}`, time.map(() => design)],
    [`liquid-temperature.${place}`, time.map(() => 288)],
    [`gas-temperature.${place}`, time.map(() => 290)],
  ]),
);
const warned = (quantities: Record<string, readonly number[]>, more: Partial<Parameters<typeof handMade>[0]> = {}) =>
  rangeWarnings(handMade({ time, quantities: { ...normal, ...quantities }, ...more }), fluids).filter(
    ({ kind }) => kind !== 'from-memory',
  );

describe('ranges left', () => {
  test('none in normal running', () => {
    expect(warned({})).toEqual([]);
  });

  test('a segment that drains is said to be drained, at the first moment and once', () => {
    const found = warned({ 'liquid-load.middle': [design, 0, 0], 'liquid-load.bottom': [design, design, 0] });
    expect(found.map(({ kind, time: t }) => [kind, t])).toEqual([['range-left', 10]]);
    expect(found[0]?.text).toMatch(/middle segment is drained/);
  });

  test("Onda's Weber number has an upper end: L^2/(rho sigma a) = 0.27", () => {
    // [Onda1968] range from memory, as in the correlation's own table. L at the end, 1 % below and above.
    const a = plant.column.beds[0]!.packing.area;
    const T = 288;
    const limit = Math.sqrt((0.27 * fluids.surfaceTension(T) * a) / fluids.solventDensity(T));
    const at = (factor: number) => warned({ 'liquid-load.bottom': [design, design, factor * limit] });
    // Froude's upper end, 1.8e-2, comes first in the table and is left earlier with this packing.
    expect(at(1.01).some(({ text }) => /(WeL|FrL) in the bottom segment/.test(text))).toBe(true);
  });

  test('temperatures outside what the property functions share', () => {
    const found = warned({ 'gas-temperature.top': [290, 384, 290] });
    expect(found).toMatchObject([{ kind: 'range-left', time: 10 }]);
    expect(found[0]?.text).toContain('gas temperature in the top segment');
  });

  test('more than 90 % of flood, and flooding', () => {
    const found = warned({ 'flood-approach': [0.6, 0.91, 1.1], loading: [0.1, 0.7, 1.2] });
    expect(found.map(({ kind, time: t }) => [kind, t])).toEqual([
      ['near-flood', 10],
      ['flooded', 20],
    ]);
  });

  test('a Henry coefficient beyond 1 mol%, in a case that uses one', () => {
    const strong = { 'liquid-strength-highest.acetone': [0.001, 0.02, 0.02] };
    const henry = { model: 'henry', solubility: 0.27, temperatureFactor: 5000 } as const;
    const solutes = plant.solutes.map((s) => ({ ...s, equilibrium: henry }));
    expect(warned(strong, { plant: { solutes } }).map(({ time: t }) => t)).toEqual([10]);
  });

  test('an instrument at the end of its range while the plant is beyond', () => {
    const found = warned({}, { truth: { 'AT-310': [0, 2e-3, 0] }, shown: { 'AT-310': [0, 1e-3, 0] } });
    expect(found).toMatchObject([{ kind: 'instrument-range', time: 10 }]);
  });
});

test('values from memory are listed', () => {
  const found = rangeWarnings(handMade({ time, quantities: normal }), fluids).find(
    ({ kind }) => kind === 'from-memory',
  );
  expect(found?.text).toContain('column.transfer.kLFactor');
  expect(found?.time).toBeNull();
});
