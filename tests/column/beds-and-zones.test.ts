import { describe, expect, it } from 'vitest';
import type { Case } from '../../sim/case/case.ts';
import type { Column } from '../../sim/column/column.ts';
import { absorber, bare, linearBed, withBeds, withColumn } from '../support/column-cases.ts';
import { settled } from '../support/column-runs.ts';

// What a column is cut into must not show: two beds for one, two equal zones for one. Unequal zones cost performance.

const one = bare(withBeds(absorber, { height: 5, segments: 20 }));

/** The bed cut in two, with the liquid gathered between. */
function halved(plant: Case): Case {
  const bed = plant.column.beds[0]!;
  const half = { ...bed, height: bed.height / 2, segments: bed.segments / 2 };
  return withColumn(plant, { beds: [half, { ...half, redistributorVolume: 0.02 }] });
}

/** Mixed strength of the gas outlet of all zones. */
function mixedOutlet(column: Column): number {
  const { outputs: op } = column;
  let solute = 0;
  let flow = 0;
  for (const { work } of column.chains[0]!) {
    solute += work.outputs[op.gasFlow]! * work.outputs[op.y + 1]!;
    flow += work.outputs[op.gasFlow]!;
  }
  return solute / flow;
}

describe('two beds with a stirred redistributor between', () => {
  it('are one bed of both heights, in outlet strength, temperature, flow and pressure drop', () => {
    const whole = settled(one).outlet;
    const cut = settled(halved(one)).outlet;
    // Each half closes with its own end faces: 4e-5 of the outlet measured at 40 segments, 1e-5 of the drop.
    expect(Math.abs(cut.y[0]! / whole.y[0]! - 1)).toBeLessThan(2e-4);
    expect(Math.abs(cut.c[0]! / whole.c[0]! - 1)).toBeLessThan(1e-5);
    expect(Math.abs(cut.TG - whole.TG)).toBeLessThan(1e-3);
    expect(Math.abs(cut.TL - whole.TL)).toBeLessThan(1e-3);
    expect(Math.abs(cut.drop / whole.drop - 1)).toBeLessThan(5e-5);
    expect(Math.abs(cut.held / whole.held - 1)).toBeLessThan(1e-5);
  });

  it('with constant coefficients are one bed exactly', () => {
    const plant = linearBed({ NOG: 5, A: 1.3 });
    const whole = settled(plant).outlet;
    const cut = settled(halved(plant)).outlet;
    expect(Math.abs(cut.y[0]! / whole.y[0]! - 1)).toBeLessThan(1e-9); // the face values are exact on this profile
    expect(Math.abs(cut.c[0]! / whole.c[0]! - 1)).toBeLessThan(1e-9);
  });
});

describe('two zones', () => {
  it.each([0.5, 0.3])('that share liquid as they share area (%d) are one zone', (share) => {
    const whole = settled(one);
    const zoned = settled(withColumn(one, { distribution: { areaShare: share, liquidShare: share } }));
    expect(Math.abs(mixedOutlet(zoned.column) / mixedOutlet(whole.column) - 1)).toBeLessThan(1e-9); // rounding
    expect(Math.abs(zoned.outlet.held / whole.outlet.held - 1)).toBeLessThan(1e-9);
    expect(Math.abs(zoned.y[zoned.column.layout.gasShare[0]!]! - share)).toBeLessThan(1e-9); // and the gas with them
  });

  it('the more unequal, the more solute leaves', () => {
    const left = [0.5, 0.55, 0.6, 0.65].map((liquidShare) =>
      mixedOutlet(settled(withColumn(one, { distribution: { areaShare: 0.5, liquidShare } })).column),
    );
    for (let i = 1; i < left.length; i++) expect(left[i]!).toBeGreaterThan(left[i - 1]!);
    expect(left.at(-1)! / left[0]!).toBeGreaterThan(2);
  });

  it('the wetter zone of two takes less gas, and both have one pressure drop', () => {
    const { column, y } = settled(withColumn(one, { distribution: { areaShare: 0.5, liquidShare: 0.65 } }));
    const [wet, dry] = column.chains[0]!.map((chain) => chain.work.outputs[column.outputs.pressureDrop]!);
    expect(Math.abs(wet! / dry! - 1)).toBeLessThan(1e-6);
    expect(y[column.layout.gasShare[0]!]!).toBeLessThan(0.5);
  });
});
